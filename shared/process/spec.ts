import { FEED_POWER, isQuality, unitFeed, waterFlow, type FeedRefusal, type JetMake } from './feed.ts'
import { cutRefusal, type Abrasive, type CutRefusal, type WorkMaterial } from './materials.ts'

/** How the jet slows where the path turns, so that the lagging bottom of the jet does not swing past the corner. */
export interface CornerSlowing {
  /** Before and after a corner, along the axis at the top face, mm. */
  readonly distance: number
  /** Of the feed that the material allows there, above 0 and up to 1. */
  readonly share: number
  /** A path that turns by more than this has a corner, radians. */
  readonly turn: number
}

/** Figures to start from: common practice, no source. A shop sets its own. */
export const CORNER_SLOWING: CornerSlowing = { distance: 3, share: 0.5, turn: Math.PI / 18 }

/**
 * Time that a standing jet takes to pierce, seconds per mm of its path: common practice, no source (a quarter of a
 * minute for an inch of steel; softer work goes faster, moving pierces too).
 */
export const PIERCE_SECONDS = 0.6

/** Everything about the process that the user settles. */
export interface ProcessSpec {
  readonly material: WorkMaterial
  readonly abrasive: Abrasive
  readonly make: JetMake
  /** Edge quality of the walls, 1 roughest to 5 finest. */
  readonly quality: number
  /** Of leads and of turns in the waste; the walls' when left out. */
  readonly wasteQuality?: number | undefined
  readonly corners?: CornerSlowing | undefined
  readonly pierceSeconds?: number | undefined
  /** Water, l/min; worked out from pressure and orifice when left out. */
  readonly water?: number | undefined
}

export const specRefusalCodes = [
  'corner-slowing-out-of-range',
  'pierce-out-of-range',
  'water-out-of-range',
] as const
export type SpecRefusalCode = (typeof specRefusalCodes)[number]

export interface SpecRefusal {
  readonly kind: 'refused'
  readonly code: SpecRefusalCode
}

export type ProcessRefusal = CutRefusal | FeedRefusal | SpecRefusal

/** A spec with everything left out filled in, checked. */
export interface Settled {
  readonly kind: 'settled'
  /** Feed over a path of 1 mm at the walls' quality and at the waste's, mm/min. */
  readonly wallFeed: number
  readonly wasteFeed: number
  readonly corners: CornerSlowing
  /** Seconds per mm of path. */
  readonly pierceSeconds: number
  /** l/min */
  readonly water: number
  /** kg/min */
  readonly abrasiveRate: number
}

export function settle(spec: ProcessSpec): Settled | ProcessRefusal {
  const { material, abrasive, make, quality, wasteQuality = quality } = spec
  const { corners = CORNER_SLOWING, pierceSeconds = PIERCE_SECONDS } = spec
  const uncut = cutRefusal(material, abrasive)
  if (uncut) return uncut
  const unit = unitFeed(material.machinability, make, abrasive.factor)
  if (typeof unit !== 'number') return unit
  if (!isQuality(quality) || !isQuality(wasteQuality))
    return { kind: 'refused', code: 'quality-out-of-range' }
  const { distance, share, turn } = corners
  if (!(distance >= 0 && distance < Infinity && share > 0 && share <= 1 && turn >= 0))
    return { kind: 'refused', code: 'corner-slowing-out-of-range' }
  if (!(pierceSeconds >= 0 && pierceSeconds < Infinity))
    return { kind: 'refused', code: 'pierce-out-of-range' }
  const water = spec.water ?? waterFlow(make.pressure, make.orifice)
  if (!(water >= 0 && water < Infinity)) return { kind: 'refused', code: 'water-out-of-range' }
  return {
    kind: 'settled',
    wallFeed: unit / quality ** FEED_POWER,
    wasteFeed: unit / wasteQuality ** FEED_POWER,
    corners,
    pierceSeconds,
    water,
    abrasiveRate: make.abrasiveRate / 1000,
  }
}
