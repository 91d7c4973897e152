import type { ViewState } from '../camera/view-state.ts'

/** Where the eye is, in words: "from 28° right, 38° above". */
export function readingOf({ azimuth, elevation }: Pick<ViewState, 'azimuth' | 'elevation'>): string {
  const round = Math.round((azimuth * 180) / Math.PI)
  const height = Math.round((elevation * 180) / Math.PI)
  const side = round === 0 ? 'the front' : `${Math.abs(round)}° ${round > 0 ? 'right' : 'left'}`
  return `from ${side}, ${Math.abs(height)}° ${height < 0 ? 'below' : 'above'}`
}
