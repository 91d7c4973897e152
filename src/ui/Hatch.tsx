/** The breach hatch, to be used as `fill="url(#id)"` within the same SVG. */
export function HatchDef({
  id,
  colour = 'var(--breach)',
  gap = 5,
}: {
  id: string
  colour?: string
  gap?: number
}) {
  return (
    <pattern id={id} width={gap} height={gap} patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
      <line x1={0} y1={0} x2={0} y2={gap} stroke={colour} strokeWidth={1.5} />
    </pattern>
  )
}
