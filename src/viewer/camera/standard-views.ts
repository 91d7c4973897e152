/** The seven named directions to look from, in the order of the keys 1 to 7. Radians. */
const DEGREE = Math.PI / 180

export const STANDARD_VIEWS = [
  { name: 'top', azimuth: 0, elevation: 90 * DEGREE },
  { name: 'front', azimuth: 0, elevation: 0 },
  { name: 'right', azimuth: 90 * DEGREE, elevation: 0 },
  { name: 'back', azimuth: 180 * DEGREE, elevation: 0 },
  { name: 'left', azimuth: -90 * DEGREE, elevation: 0 },
  { name: 'below', azimuth: 0, elevation: -90 * DEGREE },
  { name: 'corner', azimuth: 28 * DEGREE, elevation: 38 * DEGREE },
] as const

export type StandardView = (typeof STANDARD_VIEWS)[number]
export type StandardViewName = StandardView['name']

export function standardView(name: StandardViewName): StandardView {
  return STANDARD_VIEWS.find((view) => view.name === name)!
}
