import { PX_PER_MM } from '../../section/scales.ts'

/** Every 10 mm; longer ones at 0, 50 and 100. */
const TICKS = Array.from({ length: 11 }, (_, i) => {
  const [top, bottom] = i % 5 === 0 ? [0, 4] : [1, 3]
  return `M${i * 10 * PX_PER_MM} ${top * PX_PER_MM}V${bottom * PX_PER_MM}`
}).join('')

/**
 * A bar of exactly 100 mm, to see whether the printer kept the size. Drawn in CSS px without a view box: a
 * browser snaps a view box to whole pixels, which would cost half a thousandth.
 */
export function ScaleBar() {
  return (
    <figure className="sheet-keep flex items-center gap-[4mm] print:mt-[3mm] m-0">
      <svg
        role="img"
        aria-label="Scale bar, 100 mm at actual size"
        width={110 * PX_PER_MM}
        height={4 * PX_PER_MM}
        className="shrink-0 overflow-visible"
        fill="none"
        stroke="#000"
        strokeWidth={0.25 * PX_PER_MM}
      >
        <path d={`M0 ${2 * PX_PER_MM}H${100 * PX_PER_MM}`} data-bar="100mm" />
        <path d={TICKS} />
      </svg>
      <figcaption className="text-[7.5pt]">
        100 mm when printed at actual size. Measure it before you scale anything from this paper.
      </figcaption>
    </figure>
  )
}
