const browsers: readonly [RegExp, string][] = [
  [/Edg\//, 'Edge'],
  [/Firefox\//, 'Firefox'],
  [/Chrome\//, 'Chrome or Chromium'],
  [/Safari\//, 'Safari'],
]
const systems: readonly [RegExp, string][] = [
  [/Android/, 'Android'],
  [/iPhone|iPad/, 'iOS'],
  [/Windows/, 'Windows'],
  [/Mac OS X/, 'macOS'],
  [/Linux/, 'Linux'],
]

/** A browser and a system by what it says of itself, well enough for its owner to know it again. */
export function deviceInWords(userAgent: string): string {
  const browser = browsers.find(([pattern]) => pattern.test(userAgent))?.[1]
  const system = systems.find(([pattern]) => pattern.test(userAgent))?.[1]
  if (browser === undefined) return userAgent === '' ? 'Unknown program' : userAgent.slice(0, 60)
  return system === undefined ? browser : `${browser} on ${system}`
}
