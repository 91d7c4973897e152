import { useMemo } from 'react'
import type { Revision, Setup } from '../../../shared/api/setups.ts'
import type { Evaluation } from '../../../shared/evaluate/schema.ts'
import { cautions } from '../../../shared/files/cautions.ts'
import { useUnit } from '../../app/preferences.ts'
import type { Standing } from '../../revision/standing.ts'
import { ApprovalBlock } from './ApprovalBlock.tsx'
import { EdgeTable } from './EdgeTable.tsx'
import { FindingsList } from './FindingsList.tsx'
import { Heading } from './Heading.tsx'
import { Outline } from './Outline.tsx'
import { PrepSections } from './PrepSections.tsx'
import { ScaleBar } from './ScaleBar.tsx'
import { SetupFacts } from './SetupFacts.tsx'
import { TitleBlock } from './TitleBlock.tsx'
import { prepGroups, sheetRows } from './sheet-model.ts'
import { useRunningHeads } from './use-running-heads.ts'

interface PaperProps {
  readonly setup: Setup
  readonly revision: Revision
  readonly standing: Standing
  readonly evaluation: Evaluation
}

/** The sheet of paper, black on white on every screen. */
export function Paper({ setup, revision, standing, evaluation }: PaperProps) {
  const unit = useUnit()
  const { content } = revision
  const rows = useMemo(() => sheetRows(content, evaluation), [content, evaluation])
  const groups = useMemo(() => prepGroups(rows), [rows])
  useRunningHeads(setup, revision, standing)
  return (
    <article
      aria-label="Set-up sheet"
      className="sheet-paper border border-rule flex flex-col gap-[5mm] print:block"
    >
      <TitleBlock setup={setup} revision={revision} standing={standing} rows={rows} unit={unit} />
      <ApprovalBlock revision={revision} standing={standing} />
      <Outline content={content} evaluation={evaluation} rows={rows} unit={unit} />
      <ScaleBar />
      <SetupFacts content={content} evaluation={evaluation} unit={unit} />
      <FindingsList findings={evaluation.findings} />
      <EdgeTable rows={rows} groups={groups} unit={unit} />
      <PrepSections groups={groups} thickness={content.plate.thickness} unit={unit} />
      {content.note.trim() !== '' && (
        <section className="sheet-keep print:mt-[5mm]">
          <Heading>Note</Heading>
          <p className="whitespace-pre-wrap">{content.note}</p>
        </section>
      )}
      <section className="sheet-keep print:mt-[5mm]">
        <Heading>Cautions</Heading>
        <ul className="list-disc pl-[5mm]">
          {cautions.map((text) => (
            <li key={text}>{text}</li>
          ))}
        </ul>
      </section>
    </article>
  )
}
