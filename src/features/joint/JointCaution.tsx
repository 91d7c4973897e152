import { Caution } from '../../ui/Caution.tsx'

export function JointCaution() {
  return (
    <Caution>
      <p>
        The welding procedure and the drawing rule, not this screen. Where they differ from it, or a gauge
        does, stop and ask the engineer. Angles and areas are of the drawn shape; a cut edge has its own
        tolerance.
      </p>
    </Caution>
  )
}
