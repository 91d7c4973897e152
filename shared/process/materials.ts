/**
 * What is cut and with what. Hardness on Mohs' scale, density in kg/m³, both common figures from memory; a
 * shop's own material takes the same shape.
 */

export interface WorkMaterial {
  readonly name: string
  /**
   * Machinability number N of the feed equation: Zeng and Kim 1992, from memory. Null where none is known; then
   * no feed is told.
   */
  readonly machinability: number | null
  readonly mohs: number
  readonly density: number
  /** Metals are cut less thick than the rest. */
  readonly metal: boolean
  /** Why no jet cuts it, whatever its hardness. */
  readonly never?: 'shatters' | undefined
}

const of = (name: string, machinability: number | null, mohs: number, density: number, metal: boolean) => ({
  name,
  machinability,
  mohs,
  density,
  metal,
})

export const workMaterials = {
  'stainless-304': of('Stainless steel 304', 81.9, 6, 8000, true),
  'stainless-316l': of('Stainless steel 316L', 83.1, 6, 8000, true),
  'mild-steel': of('Mild steel', 87.6, 4.5, 7850, true),
  copper: of('Copper', 110, 3, 8960, true),
  titanium: of('Titanium', 115, 6, 4510, true),
  'cast-iron': of('Cast iron', 121, 5, 7200, true),
  aluminium: of('Aluminium', 213, 2.75, 2700, true),
  granite: of('Granite', 322, 7, 2700, false),
  glass: of('Glass, annealed', 596, 5.5, 2500, false),
  // In the table so that asking for them is answered: neither can be cut (common practice, no source).
  'tempered-glass': { ...of('Tempered glass', null, 5.5, 2500, false), never: 'shatters' },
  diamond: of('Diamond', null, 10, 3510, false),
} as const satisfies Record<string, WorkMaterial>
export type WorkMaterialCode = keyof typeof workMaterials

export interface Abrasive {
  readonly name: string
  /** Factor f of the feed equation. */
  readonly factor: number
  /** Grains are not all alike: softest and hardest. */
  readonly mohs: readonly [number, number]
}

/** f is 1 for garnet (Zeng and Kim 1992, from memory); hardness: common practice, no source. */
export const abrasives = {
  garnet: { name: 'Garnet', factor: 1, mohs: [7.5, 8.5] },
} as const satisfies Record<string, Abrasive>
export type AbrasiveCode = keyof typeof abrasives

export const cutRefusalCodes = [
  /** Stressed throughout: it bursts as soon as its skin is broken. */
  'shatters',
  /** Not softer than the hardest grain of the abrasive. */
  'harder-than-abrasive',
] as const
export type CutRefusalCode = (typeof cutRefusalCodes)[number]

export interface CutRefusal {
  readonly kind: 'refused'
  readonly code: CutRefusalCode
  readonly mohs: number
  readonly abrasiveMohs: number
}

/** Why a material cannot be cut with an abrasive; null when it can. */
export function cutRefusal(material: WorkMaterial, abrasive: Abrasive): CutRefusal | null {
  const { mohs, never } = material
  const abrasiveMohs = abrasive.mohs[1]
  if (never) return { kind: 'refused', code: never, mohs, abrasiveMohs }
  if (!(mohs < abrasiveMohs)) return { kind: 'refused', code: 'harder-than-abrasive', mohs, abrasiveMohs }
  return null
}

/** Thickest plate cut in practice, mm: common practice, no source. */
export const THICKEST_METAL = 150
export const THICKEST_OTHER = 450

export type MaterialNote =
  /** Thicker than is cut in practice; `limit` in mm. */
  | { readonly code: 'thicker-than-practice'; readonly limit: number }
  /** As hard as the softer grains, which then wear without cutting; `limit` on Mohs' scale. */
  | { readonly code: 'nearly-as-hard-as-abrasive'; readonly limit: number }

/** What speaks against a cut without forbidding it. */
export function materialNotes(material: WorkMaterial, abrasive: Abrasive, thickness: number): MaterialNote[] {
  const notes: MaterialNote[] = []
  const limit = material.metal ? THICKEST_METAL : THICKEST_OTHER
  if (thickness > limit) notes.push({ code: 'thicker-than-practice', limit })
  if (material.mohs >= abrasive.mohs[0] && material.mohs < abrasive.mohs[1])
    notes.push({ code: 'nearly-as-hard-as-abrasive', limit: abrasive.mohs[0] })
  return notes
}
