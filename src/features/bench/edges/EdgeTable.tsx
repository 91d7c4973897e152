import { useEffect, useMemo, useRef, type KeyboardEvent, type MouseEvent } from 'react'
import { edgeKey, edgeName } from '../../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import { formatAngle, formatLength } from '../../../../shared/units/format.ts'
import { allEdges, sameEdge } from '../model/edges.ts'
import { useActs, useBench, useContent } from '../model/store.ts'
import { facetsOf } from '../model/walls.ts'
import { wallWords } from '../model/words.ts'
import { limitOf, useScene } from '../scene.ts'
import { moveKeys } from '../move-keys.ts'
import { useRows } from './use-rows.ts'

const ROW_HEIGHT = 32
const MOST_HEIGHT = 480

const columns = [
  'edge',
  'prep',
  'top length',
  'bottom length',
  'bottom offset',
  'jet tilt per facet',
  'needed / limit',
]

/** Every edge as a row of numbers; rows select as in a list. */
export function EdgeTable() {
  const loops = useBench((state) => state.loops)
  const selection = useBench((state) => state.selection)
  const active = useBench((state) => state.active)
  const acts = useActs()
  const box = useRef<HTMLDivElement>(null)
  const rows = useMemo(() => allEdges(loops), [loops])
  const selected = useMemo(() => new Set(selection.map(edgeKey)), [selection])
  const height = Math.min(MOST_HEIGHT, (rows.length + 1) * ROW_HEIGHT + 2)
  const { first, end, onScroll } = useRows(rows.length, ROW_HEIGHT, height)
  const at =
    active === null
      ? 0
      : Math.max(
          0,
          rows.findIndex((edge) => sameEdge(edge, active)),
        )

  // The row that the keyboard stands on is kept in sight, whoever moved there.
  useEffect(() => {
    const view = box.current
    if (view === null) return
    const top = at * ROW_HEIGHT
    const seen = view.clientHeight - 2 * ROW_HEIGHT
    if (top < view.scrollTop) view.scrollTop = top
    else if (top > view.scrollTop + seen) view.scrollTop = top - seen
    if (view.contains(document.activeElement)) {
      view.querySelector<HTMLElement>(`[data-row="${at}"]`)?.focus({ preventScroll: true })
    }
  }, [at])

  function keyed(event: KeyboardEvent) {
    moveKeys(event, { edges: rows, at, back: 'ArrowUp', forth: 'ArrowDown', acts })
  }

  return (
    <div
      ref={box}
      onScroll={onScroll}
      className="relative overflow-auto border border-rule bg-panel"
      style={{ maxHeight: height }}
    >
      <table
        role="grid"
        aria-label="Edges"
        aria-multiselectable="true"
        aria-rowcount={rows.length + 1}
        onKeyDown={keyed}
        className="w-full text-left whitespace-nowrap"
      >
        <thead className="sticky top-0 bg-panel text-small text-muted z-10">
          <tr style={{ height: ROW_HEIGHT }} aria-rowindex={1}>
            {columns.map((name) => (
              <th key={name} scope="col" className="font-normal px-2 border-b border-rule">
                {name}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {first > 0 && <Spacer rows={first} />}
          {rows.slice(first, end).map((edge, i) => (
            <EdgeRow
              key={edgeKey(edge)}
              edge={edge}
              index={first + i}
              selected={selected.has(edgeKey(edge))}
              tabbable={first + i === at}
            />
          ))}
          {end < rows.length && <Spacer rows={rows.length - end} />}
        </tbody>
      </table>
    </div>
  )
}

function Spacer({ rows }: { rows: number }) {
  return (
    <tr aria-hidden="true" style={{ height: rows * ROW_HEIGHT }}>
      <td />
    </tr>
  )
}

interface EdgeRowProps {
  readonly edge: EdgeRef
  readonly index: number
  readonly selected: boolean
  readonly tabbable: boolean
}

function EdgeRow({ edge, index, selected, tabbable }: EdgeRowProps) {
  const { unit, edges, head, breaches } = useScene()
  const content = useContent()
  const acts = useActs()
  const known = edges.get(edgeKey(edge))
  const limit = limitOf(head)
  const over = breaches.has(edgeKey(edge))
  const words = wallWords(facetsOf(content, edge), unit)
  const length = (mm: number | null | undefined) =>
    mm === undefined ? '…' : mm === null ? 'none' : formatLength(mm, unit)

  function clicked(event: MouseEvent) {
    acts.select(edge, event.shiftKey ? 'range' : event.ctrlKey || event.metaKey ? 'toggle' : 'replace')
  }

  return (
    <tr
      data-row={index}
      data-edge={edgeKey(edge)}
      aria-rowindex={index + 2}
      aria-selected={selected}
      tabIndex={tabbable ? 0 : -1}
      onClick={clicked}
      style={{ height: ROW_HEIGHT }}
      className={`cursor-pointer border-b border-rule hover:bg-face outline-offset-[-2px] ${selected ? 'bg-face font-medium shadow-none' : ''}`}
    >
      <th
        role="gridcell"
        scope="row"
        className={`px-2 font-medium border-l-4 ${selected ? 'border-l-select font-bold' : 'border-l-transparent'}`}
      >
        {edgeName(edge)}
      </th>
      <td className="px-2 max-sm:max-w-40 max-[1199px]:max-w-72 truncate" title={words}>
        {words}
      </td>
      <td className="px-2 text-right">{length(known?.topLength)}</td>
      <td className="px-2 text-right">{length(known?.bottomLength)}</td>
      <td className="px-2 text-right">
        {known === undefined ? '…' : formatLength(known.bottomOffset, unit, { sign: true })}
      </td>
      <td className="px-2 text-right">
        {known?.jetTilts.map((tilt) => formatAngle(tilt, { decimals: 1, sign: true })).join(' / ')}
      </td>
      <td className={`px-2 text-right ${over ? 'text-breach font-bold' : ''}`}>
        {known === undefined ? '…' : formatAngle(known.wholeTilt, { decimals: 1 })} /{' '}
        {formatAngle(limit, { decimals: 1 })}
        {over ? ' over' : ''}
      </td>
    </tr>
  )
}
