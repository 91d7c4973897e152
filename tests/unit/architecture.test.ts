import { cruise, type ICruiseResult, type IFlattenedRuleSet } from 'dependency-cruiser'
import fs from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import config from '../../.dependency-cruiser.mjs'

const root = path.resolve(import.meta.dirname, '../..')
const ruleSet = { forbidden: config.forbidden } as IFlattenedRuleSet

/** Breaches of the arrows as lines a person can act on. */
async function breaches(folders: string[], baseDir: string): Promise<string[]> {
  const { output } = await cruise(folders, { ...config.options, baseDir, validate: true, ruleSet } as never)
  const result = output as ICruiseResult
  return result.summary.violations.map((v) => `${v.rule.name}: ${v.from} → ${v.to}`)
}

describe('arrows between folders', () => {
  it('holds everywhere', { timeout: 120_000 }, async () => {
    expect(await breaches(['shared', 'server', 'src'], root)).toEqual([])
  })

  it('sees a breach of each kind', { timeout: 120_000 }, async () => {
    fs.mkdirSync(path.join(root, '.data'), { recursive: true })
    const folder = fs.mkdtempSync(path.join(root, '.data', 'arrows-'))
    try {
      const write = (file: string, text: string) => {
        fs.mkdirSync(path.join(folder, path.dirname(file)), { recursive: true })
        fs.writeFileSync(path.join(folder, file), text)
      }
      fs.copyFileSync(path.join(root, 'tsconfig.json'), path.join(folder, 'tsconfig.json'))
      write('shared/geometry/a.ts', `import './b.ts'\nimport '../evaluate/e.ts'\nimport 'node:fs'`)
      write('shared/geometry/b.ts', `import './a.ts'`)
      write('shared/evaluate/e.ts', `export {}`)
      write('server/s.ts', `import '../src/p.ts'`)
      write('src/p.ts', `import '../server/s.ts'`)
      write('src/features/one/x.ts', `import '../two/y.ts'`)
      write('src/features/two/y.ts', `export {}`)
      const seen = (await breaches(['shared', 'server', 'src'], folder)).map((line) => line.split(':')[0])
      for (const rule of [
        'no-cycles',
        'shared-geometry',
        'shared-stands-alone',
        'server-not-src',
        'src-not-server',
        'screens-apart',
      ])
        expect(seen).toContain(rule)
    } finally {
      fs.rmSync(folder, { recursive: true, force: true })
    }
  })
})
