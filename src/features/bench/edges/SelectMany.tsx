import { Button } from '../../../ui/Button.tsx'
import { allEdges } from '../model/edges.ts'
import { picks } from '../model/picks.ts'
import { useActs, useBench } from '../model/store.ts'

/** From the selected edges to all that are like them. */
export function SelectMany() {
  const loops = useBench((state) => state.loops)
  const selection = useBench((state) => state.selection)
  const acts = useActs()
  return (
    <div role="group" aria-label="Select more edges" className="flex flex-wrap items-center gap-2 py-1">
      <span className="text-small text-muted">
        {selection.length} of {loops.reduce((sum, loop) => sum + loop.length, 0)} selected. Add the
      </span>
      {picks.map(({ label, pick }) => (
        <Button
          key={label}
          disabled={selection.length === 0}
          onClick={() => acts.selectMany(pick(loops, selection))}
        >
          {label}
        </Button>
      ))}
      <Button onClick={() => acts.selectMany(allEdges(loops))}>all</Button>
      <Button disabled={selection.length === 0} onClick={() => acts.select(null, 'replace')}>
        none
      </Button>
    </div>
  )
}
