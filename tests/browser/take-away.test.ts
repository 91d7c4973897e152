import { parse } from 'csv-parse/sync'
import { readFileSync } from 'node:fs'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { SetupRow } from '../../shared/api/setups.ts'
import type { Evaluation } from '../../shared/evaluate/schema.ts'
import { cautions } from '../../shared/files/cautions.ts'
import { launchChromium, signIn, visit } from '../support/browser.ts'
import { ezdxf } from '../support/ezdxf.ts'
import { readPdf } from '../support/pdf.ts'

/** What a person takes away, fetched as a person fetches it and read back by readers that are not ours. */

let browser: Browser
let page: Page
let faults: string[]
beforeAll(async () => {
  browser = await launchChromium()
  ;({ page, faults } = await visit(browser, { acceptDownloads: true }))
  await signIn(page, 'programmer')
})
afterAll(async () => {
  await browser.close()
})

/** 100 mm in points of 1/72 in. */
const BAR = (100 / 25.4) * 72

async function demoSetup(partNumber: string): Promise<SetupRow> {
  const answer = (await (await page.request.get('/api/setups?pageSize=100')).json()) as { items: SetupRow[] }
  return answer.items.find((row) => row.partNumber === partNumber)!
}

async function download(name: string): Promise<string> {
  const waiting = page.waitForEvent('download')
  await page.getByRole('link', { name }).click()
  return readFileSync(await (await waiting).path(), 'utf8')
}

describe.each(['BP-04', 'RF-11', 'GS-07'])('what is taken away of %s', (number) => {
  let row: SetupRow
  let evaluation: Evaluation
  beforeAll(async () => {
    row = await demoSetup(number)
    const answer = await page.request.get(`/api/setups/${row.id}/revisions/${row.revision}/evaluation`)
    ;({ evaluation } = (await answer.json()) as { evaluation: Evaluation })
    await page.goto(`/setups/${row.id}`)
    await page.getByRole('button', { name: 'Take away…' }).click()
  })

  it('is a DXF whose contours are those of the evaluation, without an error or a fix', async () => {
    const read = ezdxf(await download('Contours'))
    expect([read.errors, read.fixes]).toEqual([[], []])
    const bottom = evaluation.contours.at(-1)!
    expect(bottom.depth).toBe(row.thickness)
    const drawn = read.polylines.filter(({ layer }) => layer === 'BOTTOM')
    expect(drawn.length).toBe(bottom.loops.length)
    bottom.loops.forEach((loop, i) => {
      expect(drawn[i]!.points.length).toBe(loop.length)
      loop.forEach((vertex, k) => {
        const [x, y, bulge] = drawn[i]!.points[k]!
        expect(Math.abs(x - vertex.x)).toBeLessThanOrEqual(1e-6)
        expect(Math.abs(y - vertex.y)).toBeLessThanOrEqual(1e-6)
        expect(Math.abs(bulge - (vertex.bulge ?? 0))).toBeLessThanOrEqual(1e-9)
      })
    })
  })

  it('is a CSV with a line for every facet of every edge', async () => {
    const rows = parse(await download('Edges'), { columns: true }) as Record<string, string>[]
    expect(rows.length).toBe(evaluation.edges.reduce((sum, { jetTilts }) => sum + jetTilts.length, 0))
    let line = 0
    for (const edge of evaluation.edges) {
      const row = rows[line]!
      expect([Number(row['Loop (0 is the outer one)']), Number(row['Edge index (from 0)'])]).toEqual([
        edge.loop,
        edge.edge,
      ])
      expect(Number(row['Bottom offset (mm; positive outward)'])).toBeCloseTo(edge.bottomOffset, 3)
      line += edge.jetTilts.length
    }
  })

  it('is a sheet that prints at true size, with approval and cautions', async () => {
    await page.goto(`/setups/${row.id}/sheet`)
    await page.getByRole('img', { name: /scale bar/i }).waitFor()
    const { pages, paths } = await readPdf(await page.pdf({ preferCSSPageSize: true }))
    const text = pages.join(' ').replace(/\s+/g, ' ')
    expect(text).toContain(number)
    expect(text.includes('NOT APPROVED')).toBe(row.approvedRevision === null)
    for (const caution of cautions) expect(text).toContain(caution.slice(0, 30))
    const bars = paths.filter(({ width, height }) => height < 0.01 && Math.abs(width - BAR) < 0.01)
    expect(bars.length).toBeGreaterThan(0)
    expect(faults).toEqual([])
  })
})
