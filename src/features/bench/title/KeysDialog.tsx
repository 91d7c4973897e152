import { Dialog } from '../../../ui/Dialog.tsx'
import { shortcuts } from '../use-shortcuts.ts'

/** Every key that does something on the bench, and what the signs mean. */
export function KeysDialog({ onClose }: { onClose: () => void }) {
  return (
    <Dialog wide title="Keys, and what the signs mean" onClose={onClose}>
      {shortcuts.map(({ where, keys }) => (
        <section key={where} className="flex flex-col gap-1">
          <h3 className="text-label uppercase text-muted">{where}</h3>
          <dl className="flex flex-col">
            {keys.map(([key, does]) => (
              <div key={key} className="flex flex-wrap gap-x-4 border-t border-rule py-1">
                <dt className="font-medium w-44">{key}</dt>
                <dd className="grow basis-48">{does}</dd>
              </div>
            ))}
          </dl>
        </section>
      ))}
      <section className="flex flex-col gap-1">
        <h3 className="text-label uppercase text-muted">Signs</h3>
        <p>
          Tilt is measured from vertical. <strong>+</strong> opens downward: the part is wider below and the
          cut face can be seen from above. <strong>−</strong> is undercut: the part is narrower below.
        </p>
        <p>
          A drawing may give the angle from the plate’s face instead (90° less the tilt), or the groove angle
          of both plates together. The edge card shows all three.
        </p>
      </section>
    </Dialog>
  )
}
