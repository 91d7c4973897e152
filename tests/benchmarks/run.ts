import { execFileSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { openEditor } from '../../shared/evaluate/editor.ts'
import { evaluate, workOut } from '../../shared/evaluate/evaluate.ts'
import type { Evaluation, EvaluationRequest } from '../../shared/evaluate/schema.ts'
import { consumed, growthExponent, interleaved, spreadOf, type Job, type Spread } from './measure.ts'
import { gear, requestOf, tilts, toothHeights, type OutlineName } from './outlines.ts'
import { flat, loadUniformOffset, type UniformOffset } from './uniform-offset.ts'

/**
 * `npm run benchmark`: the whole evaluation of gears of 100 to 100,000 edges against one uniform offset of the same
 * outline by Clipper2, by turns in one process. The last line is JSON.
 */

const MAIN: OutlineName = 'constant tooth'
const SIZES = [100, 1_000, 10_000, 100_000] as const
const LARGEST = 100_000
const EDITED = 10_000

const WHY = `
whole   everything worked out: contours, events, seams, volume, jet lines, interference, the way out, what is found
plate   the same without the way of the jet: what has to be known before anything is cut
read    the whole, and every edge, corner, contour, pass and finding read as the objects and texts of the answer
offset  one uniform offset by Clipper2 in WebAssembly

The main series is the gear of constant tooth: every tooth has the same shape whatever the count, so that the count
of edges is all that changes from row to row. It is the harder one: both sides are near their best on it. With
slender teeth (5 % of the radius up and down) a tooth of the largest gear is 8 m high on a pitch of 20 mm, which
nobody cuts, and the yardstick keeps thousands of edges in hand at once; that series is told too.
`

/** Half a millimetre outward: no tooth closes. */
const OFFSET = 0.5

/** Rounds at most, and what a job may take of them, ms. */
const MOST_ROUNDS = 200
const BUDGET = 1_500

const JOBS = ['whole', 'plate', 'read', 'offset'] as const
type JobName = (typeof JOBS)[number]

interface Row {
  readonly edges: number
  readonly time: Partial<Record<JobName, Spread>>
  /** Against the offset of the same round. */
  readonly ratio: Partial<Record<JobName, Spread>>
}

/** What is worked out at once, summed up; the rest stays in columns. */
function used({ volume, firstEvent, neededTilt }: Evaluation): number {
  return (volume ?? 0) + (firstEvent?.depth ?? 0) + (neededTilt?.tilt ?? 0)
}

function usedWhole(request: EvaluationRequest): number {
  const { columns, way } = workOut(request)
  return (columns.volume ?? 0) + (way?.cut?.passes.path.count ?? 0)
}

function usedRead(answer: Evaluation): number {
  const { edges, corners, contours, passes, findings } = answer
  return (
    used(answer) + edges.length + corners.length + contours.length + (passes?.length ?? 0) + findings.length
  )
}

/** The largest slender gear is given to the plate and the yardstick alone, which take some ten seconds a time as it is. */
function jobsOf(edges: number, outline: OutlineName, offset: UniformOffset): Partial<Record<JobName, Job>> {
  const loop = gear(edges, outline)
  const request = requestOf(loop)
  const path = flat(loop)
  const job = (run: () => number): Job => ({ run, budget: BUDGET })
  const plate = job(() => used(evaluate(request)))
  const yardstick = job(() => offset(path, OFFSET))
  if (outline !== MAIN && edges === LARGEST) return { plate, offset: yardstick }
  const whole = job(() => usedWhole(request))
  if (edges === LARGEST) return { whole, plate, offset: yardstick }
  return { whole, plate, read: job(() => usedRead(evaluate(request))), offset: yardstick }
}

function rowOf(edges: number, outline: OutlineName, offset: UniformOffset): Row {
  const jobs = jobsOf(edges, outline, offset)
  const names = JOBS.filter((name) => jobs[name])
  const times = interleaved(
    names.map((name) => jobs[name]!),
    MOST_ROUNDS,
  )
  const theirs = times[names.indexOf('offset')]!
  const row: Row = { edges, time: {}, ratio: {} }
  names.forEach((name, i) => {
    row.time[name] = spreadOf(times[i]!)
    const ratios = times[i]!.map((t, round) => t / theirs[round]!)
    row.ratio[name] = spreadOf(ratios)
  })
  return row
}

function table(rows: readonly Row[]): string {
  const told = (spread: Spread | undefined) =>
    spread ? `${figure(spread.median)} (${figure(spread.low)}–${figure(spread.high)})` : '–'
  const head = [
    'edges',
    ...JOBS.map((name) => `${name} ms`),
    ...JOBS.slice(0, 3).map((name) => `${name} : offset`),
  ]
  const body = rows.map(({ edges, time, ratio }) => [
    edges.toLocaleString('en'),
    ...JOBS.map((name) => told(time[name])),
    ...JOBS.slice(0, 3).map((name) => told(ratio[name])),
  ])
  const lines = [head, ...body]
  const widths = head.map((_, i) => Math.max(...lines.map((line) => line[i]!.length)))
  return lines.map((line) => line.map((cell, i) => cell.padStart(widths[i]!)).join('  ')).join('\n')
}

function figure(value: number): string {
  return value >= 100 ? value.toFixed(0) : value.toPrecision(3)
}

const rounded = (value: number) => Number(value.toPrecision(4))

function ratios(rows: readonly Row[], name: JobName) {
  return rows.flatMap(({ edges, ratio }) => {
    const own = ratio[name]
    return own ? [{ edges, ratio: rounded(own.median), spread: [rounded(own.low), rounded(own.high)] }] : []
  })
}

/** Told from 1,000 edges up, where the fixed costs no longer show. */
function growth(rows: readonly Row[], name: JobName): number {
  const large = rows.filter(({ edges, time }) => edges >= 1_000 && time[name])
  return growthExponent(
    large.map(({ edges }) => edges),
    large.map(({ time }) => time[name]!.median),
  )
}

/** One wall edited against the plate evaluated anew, by turns. */
function editRatio(): Spread {
  const request = requestOf(gear(EDITED, MAIN))
  const editor = openEditor(request)
  const { thickness } = request.plate
  let count = 0
  const edit = () => {
    count++
    const facets = [{ depth: thickness, tilt: tilts[count % tilts.length]! }]
    return used(editor.setWall({ loop: 0, edge: (count * 7919) % EDITED }, facets))
  }
  const job = (run: () => number): Job => ({ run, budget: BUDGET })
  const [edits, fresh] = interleaved([job(edit), job(() => used(evaluate(request)))], MOST_ROUNDS)
  return spreadOf(edits!.map((t, i) => t / fresh![i]!))
}

function peakMemory(edges: number): { edges: number; evaluation: number; process: number } {
  const file = fileURLToPath(new URL('./memory.ts', import.meta.url))
  const told = execFileSync(process.execPath, ['--import', 'tsx', file, String(edges)], { encoding: 'utf8' })
  return JSON.parse(told) as { edges: number; evaluation: number; process: number }
}

async function main(): Promise<void> {
  const offset = await loadUniformOffset()
  const say = (text: string) => process.stdout.write(`${text}\n`)
  say('Median and middle half; every edge with one of seven tilts, jet and head given.')
  say(WHY)
  const series = {} as Record<OutlineName, Row[]>
  for (const outline of Object.keys(toothHeights) as OutlineName[]) {
    series[outline] = SIZES.map((edges) => rowOf(edges, outline, offset))
    say(`${outline}${outline === MAIN ? ' (main series)' : ''}`)
    say(table(series[outline]))
    const [whole, plate] = [growth(series[outline], 'whole'), growth(series[outline], 'plate')]
    say(`growth exponent from 1,000 edges up: whole ${whole.toFixed(3)}, plate ${plate.toFixed(3)}\n`)
  }
  const edit = editRatio()
  say(
    `one wall edited on ${EDITED.toLocaleString('en')} edges: ${figure(edit.median)} of the plate evaluated anew`,
  )
  const memory = SIZES.slice(-2).map(peakMemory)
  for (const { edges, evaluation, process: all } of memory)
    say(
      `peak memory, ${edges.toLocaleString('en')} edges: ${figure(evaluation)} MB more, ${figure(all)} MB in all`,
    )
  say(`(consumed ${figure(consumed())})`)
  const [constant, slender] = [series['constant tooth'], series['slender tooth']]
  say(
    JSON.stringify({
      evaluate: ratios(constant, 'whole'),
      outline: MAIN,
      plate: ratios(constant, 'plate'),
      read: ratios(constant, 'read'),
      slenderTooth: {
        evaluate: ratios(slender, 'whole'),
        plate: ratios(slender, 'plate'),
        read: ratios(slender, 'read'),
      },
      growthExponent: {
        evaluate: rounded(growth(constant, 'whole')),
        plate: rounded(growth(constant, 'plate')),
      },
      oneEdgeEdit: {
        edges: EDITED,
        ratio: rounded(edit.median),
        spread: [rounded(edit.low), rounded(edit.high)],
      },
      peakMemoryMB: memory.map(({ edges, evaluation }) => ({ edges, evaluation: rounded(evaluation) })),
    }),
  )
}

await main()
