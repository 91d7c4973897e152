import { MM_PER_INCH, type DisplayUnit } from './length.ts'

/**
 * Numbers as people read them, each with its unit. Rounding happens here and nowhere else: what is stored
 * keeps every bit.
 */

export interface FormatOptions {
  /** Most decimals shown; trailing zeros are dropped unless `fixed`. */
  readonly decimals?: number
  /** Keep trailing zeros, for columns of figures. */
  readonly fixed?: boolean
  /** Show `+` before positive values. */
  readonly sign?: boolean
  /** Leave the unit off, for a field whose unit stands beside it. */
  readonly bare?: boolean
}

/** 0.01 mm and 0.0001 in: finer than a shop's gauges, so nothing that matters is rounded away. */
const LENGTH_DECIMALS = { mm: 2, in: 4 } as const
const ANGLE_DECIMALS = 2

export function formatLength(mm: number, unit: DisplayUnit, options: FormatOptions = {}): string {
  const shown = unit === 'mm' ? mm : mm / MM_PER_INCH
  const digits = formatNumber(shown, { decimals: LENGTH_DECIMALS[unit], ...options })
  return options.bare ? digits : `${digits} ${unit}`
}

/** Degrees from vertical unless the caller says otherwise. */
export function formatAngle(degrees: number, options: FormatOptions = {}): string {
  const digits = formatNumber(degrees, { decimals: ANGLE_DECIMALS, ...options })
  return options.bare ? digits : `${digits}°`
}

/** mm² or in². */
export function formatArea(mm2: number, unit: DisplayUnit, options: FormatOptions = {}): string {
  const shown = unit === 'mm' ? mm2 : mm2 / MM_PER_INCH ** 2
  const digits = formatNumber(shown, { decimals: LENGTH_DECIMALS[unit], ...options })
  return options.bare ? digits : `${digits} ${unit}²`
}

/** cm³ or in³: cubic millimetres are too many digits to read. */
export function formatVolume(mm3: number, unit: DisplayUnit, options: FormatOptions = {}): string {
  const shown = unit === 'mm' ? mm3 / 1_000 : mm3 / MM_PER_INCH ** 3
  const digits = formatNumber(shown, { decimals: 2, ...options })
  return options.bare ? digits : `${digits} ${unit === 'mm' ? 'cm³' : 'in³'}`
}

/** Decimal point, true minus sign, no grouping. */
export function formatNumber(value: number, options: FormatOptions = {}): string {
  if (!Number.isFinite(value)) return '–'
  const fixed = Math.abs(value).toFixed(options.decimals ?? 2)
  const digits = options.fixed || !fixed.includes('.') ? fixed : fixed.replace(/\.?0+$/, '')
  if (Number(digits) === 0) return digits
  return value < 0 ? `−${digits}` : options.sign ? `+${digits}` : digits
}
