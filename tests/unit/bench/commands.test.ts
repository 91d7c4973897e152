import { expect, test } from 'vitest'
import { matching, type Command } from '../../../src/features/bench/commands/commands.ts'

const command = (group: string, name: string): Command => ({ id: name, group, name, run: () => undefined })
const all = [
  command('set-up', 'undo'),
  command('select', 'parallel'),
  command('view', 'look from the top'),
  command('view', 'look from below'),
  command('edge', 'e1'),
  command('edge', 'e12'),
  command('edge', 'h1.e1'),
]
const names = (typed: string) => matching(all, typed).map(({ name }) => name)

test('nothing typed offers everything in its order', () => {
  expect(names('  ')).toEqual(all.map(({ name }) => name))
})

test('every typed word must be in the group or the name, in any order', () => {
  expect(names('top view')).toEqual(['look from the top'])
  expect(names('PAR')).toEqual(['parallel'])
  expect(names('zz')).toEqual([])
})

test('names that begin so come first', () => {
  expect(names('e1')).toEqual(['e1', 'e12', 'h1.e1'])
})
