import { workOut } from '../../shared/evaluate/evaluate.ts'
import { gear, requestOf } from './outlines.ts'

/** Run on its own: how far one evaluation raises the peak of the process, and the peak itself. Prints JSON, MB. */
const edges = Number(process.argv[2])
const request = requestOf(gear(edges, 'constant tooth'))
workOut(requestOf(gear(100, 'constant tooth')))
const before = process.resourceUsage().maxRSS
const { volume } = workOut(request).columns
const after = process.resourceUsage().maxRSS
const MB = 1024
process.stdout.write(
  JSON.stringify({ edges, evaluation: (after - before) / MB, process: after / MB, volume }),
)
