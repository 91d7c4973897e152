import { execFileSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { evaluate } from '../../shared/evaluate/evaluate.ts'
import type { Evaluation } from '../../shared/evaluate/schema.ts'
import { consumed, growthExponent, interleaved, spreadOf, type Rounds, type Spread } from './measure.ts'
import { gear, requestOf, toothHeights, type OutlineName } from './outlines.ts'
import { flat, loadUniformOffset, type UniformOffset } from './uniform-offset.ts'

/**
 * `npm run benchmark`: the whole front door on gears of 100 to 100,000 edges against one uniform offset of the same
 * outline by Clipper2, by turns in one process. The last line is JSON.
 */

const MAIN: OutlineName = 'constant tooth'
const SIZES = [100, 1_000, 10_000, 100_000] as const

const WHY = `
The main series is the gear of constant tooth: every tooth has the same shape whatever the count, so that a
count of edges is all that changes from row to row. It is the harder one: both sides are near their best on it.
With slender teeth (5 % of the radius up and down) a tooth of the largest gear is 8 m high on a pitch of 20 mm,
which nobody cuts, and the yardstick's sweep keeps thousands of edges in hand at once; that series is told too.
`

/** Half a millimetre outward: no tooth closes. */
const OFFSET = 0.5

interface Row {
  readonly edges: number
  readonly evaluate: Spread
  readonly read: Spread
  readonly offset: Spread
  readonly ratio: Spread
  readonly readRatio: Spread
}

/** What a caller gets without asking for the objects: the columns are worked out, these figures summed up. */
function used({ volume, firstEvent, neededTilt }: Evaluation): number {
  return (volume ?? 0) + (firstEvent?.depth ?? 0) + (neededTilt?.tilt ?? 0)
}

/** The same and every edge, corner, contour and finding as the objects that the answer's JSON has. */
function usedWhole(answer: Evaluation): number {
  const { edges, corners, contours, findings } = answer
  return used(answer) + edges.length + corners.length + contours.length + findings.length
}

function roundsFor(edges: number, outline: OutlineName): Rounds {
  if (outline !== MAIN && edges > 10_000) return { warmup: 0, least: 1, most: 1, budget: 0 }
  if (edges > 10_000) return { warmup: 2, least: 5, most: 15, budget: 8_000 }
  return { warmup: edges > 1_000 ? 20 : 300, least: 15, most: 400, budget: 4_000 }
}

function rowOf(edges: number, outline: OutlineName, offset: UniformOffset): Row {
  const loop = gear(edges, outline)
  const request = requestOf(loop)
  const path = flat(loop)
  const times = interleaved(
    [() => used(evaluate(request)), () => usedWhole(evaluate(request)), () => offset(path, OFFSET)],
    roundsFor(edges, outline),
  )
  const [own, read, theirs] = [times[0]!, times[1]!, times[2]!]
  return {
    edges,
    evaluate: spreadOf(own),
    read: spreadOf(read),
    offset: spreadOf(theirs),
    ratio: spreadOf(own.map((t, i) => t / theirs[i]!)),
    readRatio: spreadOf(read.map((t, i) => t / theirs[i]!)),
  }
}

function table(rows: readonly Row[]): string {
  const ms = ({ median, low, high }: Spread) => `${figure(median)} (${figure(low)}–${figure(high)})`
  const head = ['edges', 'evaluate ms', 'all objects read ms', 'one offset ms', 'ratio', 'ratio, all read']
  const body = rows.map((row) => [
    row.edges.toLocaleString('en'),
    ms(row.evaluate),
    ms(row.read),
    ms(row.offset),
    ms(row.ratio),
    ms(row.readRatio),
  ])
  const lines = [head, ...body]
  const widths = head.map((_, i) => Math.max(...lines.map((line) => line[i]!.length)))
  return lines.map((line) => line.map((cell, i) => cell.padStart(widths[i]!)).join('  ')).join('\n')
}

function figure(value: number): string {
  return value >= 100 ? value.toFixed(0) : value.toPrecision(3)
}

const rounded = (value: number) => Number(value.toPrecision(4))
const ratioLine = (edges: number, { median, low, high }: Spread) => ({
  edges,
  ratio: rounded(median),
  spread: [rounded(low), rounded(high)],
})

function peakMemory(edges: number): { edges: number; evaluation: number; process: number } {
  const file = fileURLToPath(new URL('./memory.ts', import.meta.url))
  return JSON.parse(
    execFileSync(process.execPath, ['--import', 'tsx', file, String(edges)], { encoding: 'utf8' }),
  )
}

/** Growth is told from 1,000 edges up, where the fixed costs no longer show. */
const growthOf = (rows: readonly Row[]) => {
  const large = rows.filter(({ edges }) => edges >= 1_000)
  return growthExponent(
    large.map(({ edges }) => edges),
    large.map((row) => row.evaluate.median),
  )
}

async function main(): Promise<void> {
  const offset = await loadUniformOffset()
  const say = (text: string) => process.stdout.write(`${text}\n`)
  say('Whole evaluation against one uniform offset of the same outline (Clipper2, WebAssembly).')
  say('Median and middle half; every edge with one of seven tilts, jet and head given.')
  say(WHY)
  const series = {} as Record<OutlineName, Row[]>
  for (const outline of Object.keys(toothHeights) as OutlineName[]) {
    series[outline] = SIZES.map((edges) => rowOf(edges, outline, offset))
    say(`${outline}${outline === MAIN ? ' (main series)' : ''}`)
    say(table(series[outline]))
    say(`growth exponent from 1,000 edges up: ${growthOf(series[outline]).toFixed(3)}\n`)
  }
  const memory = SIZES.slice(-2).map(peakMemory)
  for (const { edges, evaluation, process: whole } of memory)
    say(
      `peak memory, ${edges.toLocaleString('en')} edges: ${figure(evaluation)} MB more, ${figure(whole)} MB in all`,
    )
  say(`(consumed ${figure(consumed())})`)
  const main = series[MAIN]
  const slender = series['slender tooth']
  say(
    JSON.stringify({
      evaluate: main.map((row) => ratioLine(row.edges, row.ratio)),
      outline: MAIN,
      evaluateRead: main.map((row) => ratioLine(row.edges, row.readRatio)),
      slenderTooth: slender.map((row) => ratioLine(row.edges, row.ratio)),
      slenderToothRead: slender.map((row) => ratioLine(row.edges, row.readRatio)),
      growthExponent: rounded(growthOf(main)),
      peakMemoryMB: memory.map(({ edges, evaluation }) => ({ edges, evaluation: rounded(evaluation) })),
    }),
  )
}

await main()
