import { useId } from 'react'
import { HatchDef } from '../../ui/Hatch.tsx'

/** A band of hatch as vectors: printers leave CSS backgrounds out. */
export function PrintHatch() {
  const id = useId()
  return (
    <svg className="block w-full h-[4mm]" aria-hidden="true">
      <defs>
        <HatchDef id={id} colour="#000" gap={6} />
      </defs>
      <rect width="100%" height="100%" fill={`url(#${id})`} />
    </svg>
  )
}
