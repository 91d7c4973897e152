/**
 * Cautions that go with everything that leaves for the shop: drawings, tables, set-up sheets. They stand in for
 * no standard, machine manual or instruction of the shop.
 */
export const cautions: readonly string[] = [
  'Geometry only. Check it against the drawing, the welding procedure and the limits of the machine before cutting.',
  'The governing welding code, the approved procedure and licensed practice come before anything said here.',
  'Prove the program with the jet off before the first cut.',
  'A tilted jet leaves sideways below the plate: keep people, hoses and the tank wall out of its way.',
  'Parts and slugs can tip when they come free. Keep the head clear and support what may fall.',
  'A jet injury is a medical emergency, even when the wound looks small. Get the person to hospital at once and say it was a high-pressure jet.',
]
