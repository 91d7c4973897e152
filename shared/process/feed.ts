/**
 * How fast a jet cuts: Zeng and Kim 1992, constants from memory (feeds by the metric and by the inch form agree within
 * 0.24 %).
 *
 *     u = (f·N·P^1.594·d_o^1.374·M^0.343 / (C·q·h·d_m^0.618))^1.15
 *
 * u feed, mm/min; f abrasive factor, N machinability number of the work, P pump pressure, MPa; d_o orifice and d_m
 * mixing tube bore, mm; M abrasive, g/min; q edge quality, 1 (roughest: the cut just parts) to 5 (finest); h the jet's
 * path through the work, mm: thickness / cos(whole tilt), so that a tilt costs cos^1.15. C = 788 in these units.
 */

const SCALE = 788
const PRESSURE_POWER = 1.594
const ORIFICE_POWER = 1.374
const ABRASIVE_POWER = 0.343
const TUBE_POWER = 0.618
/** Power over the whole: also how feed falls with path and with quality. */
export const FEED_POWER = 1.15

export const ROUGHEST = 1
export const FINEST = 5

/** Pump pressures in use, MPa: common practice, no source. The equation is asked about nothing else. */
export const PRESSURE_RANGE = { from: 210, to: 690 } as const

/** The jet as the pump, the cutting head and the hopper make it. */
export interface JetMake {
  /** MPa */
  readonly pressure: number
  /** Orifice and mixing tube bore, mm. */
  readonly orifice: number
  readonly mixingTube: number
  /** g/min */
  readonly abrasiveRate: number
}

export const feedRefusalCodes = [
  'pressure-out-of-range',
  /** The orifice is not above 0 or does not fit inside the mixing tube. */
  'orifice-out-of-range',
  'abrasive-rate-out-of-range',
  'quality-out-of-range',
  'path-out-of-range',
  /** No machinability number is known for the material. */
  'machinability-unknown',
] as const
export type FeedRefusalCode = (typeof feedRefusalCodes)[number]

export interface FeedRefusal {
  readonly kind: 'refused'
  readonly code: FeedRefusalCode
}

/**
 * Feed at quality 1 over a path of 1 mm, mm/min: every other feed of the same jet and work is this over
 * (q·h)^1.15. Refused where a figure is out of its range.
 */
export function unitFeed(machinability: number | null, make: JetMake, factor = 1): number | FeedRefusal {
  const { pressure, orifice, mixingTube, abrasiveRate } = make
  if (machinability === null || !isPositive(machinability)) return refused('machinability-unknown')
  if (!(pressure >= PRESSURE_RANGE.from && pressure <= PRESSURE_RANGE.to))
    return refused('pressure-out-of-range')
  if (!(orifice > 0 && orifice < mixingTube && mixingTube < Infinity)) return refused('orifice-out-of-range')
  if (!isPositive(abrasiveRate)) return refused('abrasive-rate-out-of-range')
  const power =
    (factor *
      machinability *
      pressure ** PRESSURE_POWER *
      orifice ** ORIFICE_POWER *
      abrasiveRate ** ABRASIVE_POWER) /
    (SCALE * mixingTube ** TUBE_POWER)
  return power ** FEED_POWER
}

/** Feed of the axis where it runs through the work at one speed from top to bottom, mm/min. */
export function feedFor(
  machinability: number | null,
  make: JetMake,
  quality: number,
  path: number,
  factor = 1,
): number | FeedRefusal {
  if (!isQuality(quality)) return refused('quality-out-of-range')
  if (!isPositive(path)) return refused('path-out-of-range')
  const unit = unitFeed(machinability, make, factor)
  return typeof unit === 'number' ? unit / (quality * path) ** FEED_POWER : unit
}

/** What a feed costs in quality: the q at which the equation gives it. Below 1 the jet does not part the plate, above 5 it dawdles. */
export function qualityOfFeed(
  machinability: number | null,
  make: JetMake,
  feed: number,
  path: number,
  factor = 1,
): number | FeedRefusal {
  if (!isPositive(path)) return refused('path-out-of-range')
  const unit = unitFeed(machinability, make, factor)
  return typeof unit === 'number' ? (unit / feed) ** (1 / FEED_POWER) / path : unit
}

/** Qualities need not be whole. */
export function isQuality(quality: number): boolean {
  return quality >= ROUGHEST && quality <= FINEST
}

function isPositive(value: number): boolean {
  return value > 0 && value < Infinity
}

function refused(code: FeedRefusalCode): FeedRefusal {
  return { kind: 'refused', code }
}

/**
 * Water through the orifice, l/min: Cd·(π/4)·d²·√(2P/ρ), Bernoulli for water that does not give (textbook). Cd
 * covers the contraction and the give of the water together: 0.7 from memory.
 */
export function waterFlow(pressure: number, orifice: number, discharge = DISCHARGE): number {
  const area = (Math.PI / 4) * (orifice * 1e-3) ** 2
  const speed = Math.sqrt((2 * pressure * 1e6) / WATER_DENSITY)
  return discharge * area * speed * LITRES_A_MINUTE
}

const DISCHARGE = 0.7
/** kg/m³ */
const WATER_DENSITY = 1000
/** l/min per m³/s */
const LITRES_A_MINUTE = 60_000
