/**
 * A section through a plate, drawn as the product draws: 25 mm plate, 30° from vertical to a 6 mm root face, so
 * the bottom edge stands (25 − 6) · tan 30° = 10.97 mm outside the top edge. Scale 10 units to the millimetre.
 */
export function SheetMark() {
  return (
    <svg
      viewBox="0 0 460 370"
      className="w-full max-w-xl"
      role="img"
      aria-label="Section of a 25 mm plate, 30° bevel to a 6 mm root face; the bottom edge stands 10.97 mm outside the top edge."
    >
      <path d="M20 60H220L329.7 250V310H20" fill="var(--face)" stroke="var(--ink)" strokeWidth={1.5} />
      <path d="M220 60L329.7 250" stroke="var(--tilt-out)" strokeWidth={6} />
      <path d="M220 60V340M329.7 310V340" stroke="var(--muted)" strokeDasharray="10 4 2 4" />
      <path d="M191.1 10L358.6 300" stroke="var(--select)" strokeWidth={1.5} strokeDasharray="2 4" />
      <path d="M220 330H329.7M220 324V336M329.7 324V336" stroke="var(--muted)" />
      <path
        d="M380 60V250M374 60H386M374 250H386M380 250V310M374 310H386"
        stroke="var(--muted)"
        fill="none"
      />
      <path d="M220 150A90 90 0 0 0 265 138" fill="none" stroke="var(--muted)" />
      <g fill="var(--ink)" fontSize={15} fontFamily="inherit">
        <text x={228} y={175}>
          30°
        </text>
        <text x={274.8} y={356} textAnchor="middle">
          10.97
        </text>
        <text x={392} y={160}>
          19.0
        </text>
        <text x={392} y={285}>
          6.0
        </text>
      </g>
    </svg>
  )
}
