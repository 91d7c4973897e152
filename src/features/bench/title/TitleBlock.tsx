import { cornerName, edgeName } from '../../../../shared/walls/names.ts'
import { formatAngle, formatLength } from '../../../../shared/units/format.ts'
import { PageHead, type Cell } from '../../../app/Page.tsx'
import { formatInstant } from '../../../ui/when.ts'
import { sameContent } from '../model/content.ts'
import { clockText } from '../model/draft.ts'
import { useBench, useContent } from '../model/store.ts'
import { useScene } from '../scene.ts'

/** The ruled cells at the sheet's head. */
export function TitleBlock() {
  const { setup, stored, head, unit, notes, result } = useScene()
  const content = useContent()
  const { part } = stored
  const stops = notes.some(({ severity }) => severity === 'stop')
  const cells: Cell[] = [
    { label: 'Set-up', value: content.name },
    { label: 'Rev', value: `${setup.revision.number} · ${setup.revision.state}` },
    {
      label: 'Plate',
      value: `${content.plate.material} · ${formatLength(content.plate.thickness, unit)}`,
    },
    { label: 'Head', value: `${head.name} · ${limitsText(head)}` },
    useNeeded(),
    {
      label: 'Notes',
      value: result.evaluation === null ? '…' : `${notes.length} open`,
      tone: stops ? 'breach' : 'plain',
    },
    useSavedCell(),
  ]
  return <PageHead label="Part" title={`${part.name} ${part.number}`} cells={cells} />
}

function limitsText(head: { workingLimit: number | null; mechanicalLimit: number }): string {
  const bare = (limit: number) => formatAngle(limit, { bare: true })
  return head.workingLimit === null
    ? `no working limit / ${bare(head.mechanicalLimit)}°`
    : `${bare(head.workingLimit)}/${bare(head.mechanicalLimit)}°`
}

function useNeeded(): Cell {
  const { result, breaches } = useScene()
  const needed = result.evaluation?.neededTilt ?? null
  if (needed === null) {
    return { label: 'Needed at most', value: result.evaluation === null ? '…' : 'no tilt' }
  }
  const where = 'vertex' in needed.at ? `corner ${cornerName(needed.at)}` : edgeName(needed.at)
  const breach = breaches.size > 0
  return {
    label: 'Needed at most',
    value: `${formatAngle(needed.tilt, { decimals: 1 })} at ${where}`,
    tone: breach ? 'breach' : 'plain',
  }
}

function useSavedCell(): Cell {
  const { setup } = useScene()
  const content = useContent()
  const base = useBench((state) => state.base)
  const { keptAt, failed } = useBench((state) => state.draft)
  const dirty = !sameContent(content, base.content)
  if (!dirty) return { label: 'Saved', value: formatInstant(setup.revision.savedAt), tone: 'plain' }
  if (failed) return { label: 'Not saved', value: 'no room for a draft', tone: 'breach' }
  return {
    label: 'Not saved',
    value: keptAt === null ? 'keeping a draft …' : `draft ${clockText(keptAt)}`,
    tone: 'select',
  }
}
