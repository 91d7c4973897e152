import type { Revision } from '../../../shared/api/setups.ts'
import type { Standing } from '../../revision/standing.ts'
import { formatInstant } from '../../ui/when.ts'
import { PrintHatch } from './PrintHatch.tsx'
import { standingWord } from './standing-word.ts'

/** Who approved what, when, and what that means; or that nobody has. */
export function ApprovalBlock({ revision, standing }: { revision: Revision; standing: Standing }) {
  const { approval, supersededBy } = standing
  const good = approval !== null && supersededBy === null
  return (
    <section aria-label="Approval, as printed" className="sheet-keep border-2 border-black print:mt-[4mm]">
      {!good && <PrintHatch />}
      <div className="px-[3mm] py-[1.5mm] flex flex-wrap items-baseline gap-x-[5mm]">
        <p className="text-[14pt] font-bold">{standingWord(standing)}</p>
        {approval && (
          <p>
            Approved by <strong>{approval.by.name}</strong>, {formatInstant(approval.at)}
          </p>
        )}
        {good ? (
          <p className="basis-full">
            The engineer has looked at this content and allows it to be cut and fitted as it stands.
            {approval.reason.trim() !== '' && ` Remark: ${approval.reason}`}
          </p>
        ) : (
          <p className="basis-full font-bold">Do not cut or weld from this sheet.</p>
        )}
        <p className="basis-full text-[7pt] break-all">Content SHA-256 {revision.hash}</p>
      </div>
      {!good && <PrintHatch />}
    </section>
  )
}
