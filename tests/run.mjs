/**
 * `npm test`: everything that must hold, from a fresh clone. Types, lint and format first, then the four
 * suites (unit, reference, API on a real MariaDB, real Chromium). The last line counts it all:
 * `N passed, N failed, N skipped`. Arguments are handed to vitest and leave the first checks out, for example
 * `npm test -- --project unit`.
 */
import fs from 'node:fs'
import path from 'node:path'
import { spawn } from 'node:child_process'
import { ensureBuild } from '../server/run/build.mjs'
import { ensureDebian, needs } from '../server/run/debian.mjs'
import { ensurePackages } from '../server/run/packages.mjs'
import { dataDir, root } from '../server/run/paths.mjs'
import { say, StartError } from '../server/run/say.mjs'

const given = process.argv.slice(2)
const results = path.join(dataDir, `test-results-${process.pid}.json`)
const count = { passed: 0, failed: 0, skipped: 0 }

/** @type {import('node:child_process').ChildProcess | undefined} */
let current
for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM'])) {
  process.on(signal, () => {
    current?.kill(signal)
    process.exitCode = 1
  })
}

try {
  await ensurePackages()
  await ensureDebian([needs.mariadb, needs.chromium, needs.ezdxf])
  fs.mkdirSync(dataDir, { recursive: true })
  await ensureBuild()
  if (given.length === 0) {
    await check('types', 'typescript/bin/tsc', ['--noEmit', '-p', '.'])
    await check('lint', 'eslint/bin/eslint.js', ['.', '--max-warnings=0'])
    await check('format', 'prettier/bin/prettier.cjs', ['--check', '--log-level=warn', '.'])
  }
  await suites()
} catch (error) {
  count.failed += 1
  process.stderr.write(
    `\n${error instanceof StartError ? error.message : /** @type {Error} */ (error).stack}\n`,
  )
}
process.stdout.write(`\n${count.passed} passed, ${count.failed} failed, ${count.skipped} skipped\n`)
process.exit(count.failed > 0 || count.passed === 0 || process.exitCode ? 1 : 0)

/** One check that is not a suite counts as one test. @param {string} name @param {string} tool @param {string[]} args */
async function check(name, tool, args) {
  const code = await node([path.join('node_modules', tool), ...args])
  say(`${name}: ${code === 0 ? 'passed' : 'FAILED'}`)
  count[code === 0 ? 'passed' : 'failed'] += 1
}

async function suites() {
  const code = await node([
    'node_modules/vitest/vitest.mjs',
    'run',
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${results}`,
    ...given,
  ])
  if (!fs.existsSync(results)) throw new StartError('The suites ended without a result.')
  const told = JSON.parse(fs.readFileSync(results, 'utf8'))
  fs.rmSync(results)
  count.passed += told.numPassedTests
  count.failed += told.numFailedTests
  count.skipped += told.numPendingTests + told.numTodoTests
  // A suite that could not even load counts too.
  if (code !== 0 && told.numFailedTests === 0) count.failed += Math.max(1, told.numFailedTestSuites)
}

/** @param {string[]} args @returns {Promise<number>} */
function node(args) {
  return new Promise((resolve) => {
    current = spawn(process.execPath, args, { cwd: root, stdio: ['ignore', 'inherit', 'inherit'] })
    current.once('exit', (code) => resolve(code ?? 1))
    current.once('error', () => resolve(1))
  })
}
