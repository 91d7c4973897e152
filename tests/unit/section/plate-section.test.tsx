import { renderToStaticMarkup } from 'react-dom/server'
import { describe, expect, it } from 'vitest'
import { PlateSection } from '../../../src/section/PlateSection.tsx'

const facets = [
  { depth: 19, tilt: 30 },
  { depth: 25, tilt: 0 },
]

/** Drawn run and rise of the path whose element holds the tilt colour. */
function colouredRuns(markup: string): { run: number; rise: number }[] {
  return [...markup.matchAll(/<path d="M([\d.]+) ([\d.]+)L([\d.]+) ([\d.]+)"[^>]*--tilt/g)].map((match) => {
    const [x1, y1, x2, y2] = match.slice(1, 5).map(Number) as [number, number, number, number]
    return { run: x2 - x1, rise: y2 - y1 }
  })
}

describe('PlateSection', () => {
  it('draws the tilted facet at its angle in the SVG', () => {
    const runs = colouredRuns(
      renderToStaticMarkup(<PlateSection thickness={25} facets={facets} theme="paper" width={320} />),
    )
    expect(runs).toHaveLength(1)
    expect((Math.atan2(runs[0]!.run, runs[0]!.rise) * 180) / Math.PI).toBeCloseTo(30, 2)
  })

  it('mirrors it for the other plate of a joint', () => {
    const runs = colouredRuns(
      renderToStaticMarkup(
        <PlateSection
          thickness={25}
          facets={facets}
          joint={{ mate: 'same', rootOpening: 2 }}
          theme="tank"
          width={320}
        />,
      ),
    )
    expect(runs.map(({ run }) => Math.sign(run))).toEqual([1, -1])
    expect(runs[0]!.run).toBeCloseTo(-runs[1]!.run, 2)
  })

  it('says its numbers to those who cannot see it', () => {
    const markup = renderToStaticMarkup(
      <PlateSection thickness={25} facets={facets} theme="paper" width={320} />,
    )
    expect(markup).toContain('role="img"')
    expect(markup).toContain('Root face 6 mm. Thickness 25 mm. Bottom offset 10.97 mm.')
  })

  it('gives a dimension to whoever renders it, and the plain text where they decline', () => {
    const markup = renderToStaticMarkup(
      <PlateSection
        thickness={25}
        facets={facets}
        theme="paper"
        width={320}
        renderDimension={({ kind, id, value }) =>
          kind === 'facet-depth' ? <input name={id} defaultValue={value} /> : undefined
        }
      />,
    )
    expect(markup).toContain('<input name="facet-depth-0" value="19"/>')
    expect(markup).toContain('>10.97 mm</div>')
    expect(markup).not.toContain('>19 mm</div>')
  })

  it('prints without the theme’s colours', () => {
    const markup = renderToStaticMarkup(
      <PlateSection thickness={25} facets={facets} theme="tank" width={320} standardScale print />,
    )
    expect(markup).not.toContain('--tilt')
    expect(markup).not.toMatch(/(stroke|fill|text)-(ink|muted|face)/)
    expect(markup).toContain('on paper')
  })
})
