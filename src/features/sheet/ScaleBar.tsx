/** A bar of exactly 100 mm, to see whether the printer kept the size. */
export function ScaleBar() {
  return (
    <figure className="sheet-keep flex items-center gap-[4mm] print:mt-[3mm] m-0">
      <svg
        role="img"
        aria-label="Scale bar, 100 mm at actual size"
        viewBox="0 0 100 4"
        style={{ width: '100mm', height: '4mm' }}
        className="shrink-0 overflow-visible"
        fill="none"
        stroke="#000"
        strokeWidth="0.25"
      >
        <path d="M0 2H100" data-bar="100mm" />
        <path
          d={Array.from(
            { length: 11 },
            (_, i) => `M${i * 10} ${i % 5 === 0 ? 0 : 1}V${i % 5 === 0 ? 4 : 3}`,
          ).join('')}
        />
      </svg>
      <figcaption className="text-[7.5pt]">
        100 mm when printed at actual size. Measure it before you scale anything from this paper.
      </figcaption>
    </figure>
  )
}
