import { EdgeCard, useCardHead } from './card/EdgeCard.tsx'
import { MarginNotes } from './notes/MarginNotes.tsx'
import { PartView } from './PartView.tsx'
import { Region } from './Region.tsx'
import { useScene } from './scene.ts'
import { WallStrip } from './strip/WallStrip.tsx'
import { TiltLegend } from './TiltLegend.tsx'

/**
 * The drawing sheet. On a desk the part fills it, notes stand in the left margin, the edge card at the right,
 * the wall strip along the foot. A tablet has the part on top and two columns under it; a
 * phone has one column.
 */
export function Sheet() {
  const { theme, notes } = useScene()
  const card = useCardHead()
  return (
    <div className="bench-sheet">
      <div className="bench-part">
        <PartView />
      </div>
      <Region
        id="bench-notes"
        title="Notes"
        aside={notes.length > 0 ? `${notes.length} open` : undefined}
        className="bench-notes"
      >
        <MarginNotes />
      </Region>
      <div className="bench-card">
        <Region
          id="bench-card"
          title={card.title}
          aside={card.aside}
          className="bg-panel border border-rule px-3 py-2"
        >
          <EdgeCard />
        </Region>
        <div className="pt-1.5 bg-sheet">
          <TiltLegend theme={theme} />
        </div>
      </div>
      <WallStrip />
    </div>
  )
}
