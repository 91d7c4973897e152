import { Link } from 'react-router-dom'
import { edgeKey, edgeName } from '../../../../shared/walls/names.ts'
import { useMay } from '../../../app/current-user.tsx'
import { contoursUrl, edgesUrl } from '../../../api/setups.ts'
import { buttonClass } from '../../../ui/Button.tsx'
import { Caution } from '../../../ui/Caution.tsx'
import { Dialog } from '../../../ui/Dialog.tsx'
import { Notice } from '../../../ui/Notice.tsx'
import { useScene } from '../scene.ts'

/** Files and sheets of the revision shown, and its joint pages. */
export function TakeAway({ unsaved, onClose }: { unsaved: boolean; onClose: () => void }) {
  const { setup, newest } = useScene()
  const mayContours = useMay('revisionContours')
  const mayEdges = useMay('revisionEdges')
  const { number, content } = setup.revision
  const at = newest === null ? '' : `?rev=${number}`
  return (
    <Dialog title={`Take away revision ${number}`} onClose={onClose}>
      {unsaved && <Notice>What is not saved is not in these files. Save first to take it along.</Notice>}
      {setup.revision.state !== 'approved' && (
        <Caution>
          This revision is {setup.revision.state}, not approved. Do not cut from it without the shop’s leave.
        </Caution>
      )}
      <ul className="flex flex-col gap-2">
        {mayContours && (
          <li>
            <a className={buttonClass('plain')} href={contoursUrl(setup.id, number)} download>
              Contours, DXF
            </a>{' '}
            top, bottom and every level between, a layer each
          </li>
        )}
        {mayEdges && (
          <li>
            <a className={buttonClass('plain')} href={edgesUrl(setup.id, number)} download>
              Edges, CSV
            </a>{' '}
            lengths, tilts and bottom offsets
          </li>
        )}
        <li>
          <Link className={buttonClass('plain')} to={`/setups/${setup.id}/sheet${at}`}>
            Set-up sheet
          </Link>{' '}
          to print
        </li>
      </ul>
      <section className="flex flex-col gap-1">
        <h3 className="text-label uppercase text-muted">Joint pages for the welder</h3>
        {content.joints.length === 0 && (
          <p className="text-muted">No edge has a joint yet. Give one its joint on the edge card.</p>
        )}
        <ul className="flex flex-col max-h-60 overflow-y-auto">
          {content.joints.map((joint) => (
            <li key={edgeKey(joint)} className="border-t border-rule">
              <Link
                className="flex min-h-8 items-center underline underline-offset-2 hover:bg-face"
                to={`/setups/${setup.id}/joint/${edgeKey(joint)}${at}`}
              >
                {joint.label === '' ? 'Joint' : joint.label} at {edgeName(joint)}
              </Link>
            </li>
          ))}
        </ul>
      </section>
    </Dialog>
  )
}
