import { describe, expect, it } from 'vitest'
import {
  HISTORY_STEPS,
  record,
  redo,
  settle,
  startHistory,
  undo,
} from '../../../src/features/bench/model/history.ts'

const typed = (from = startHistory(0)) => record(record(record(from, 3, 'angle'), 30, 'angle'), 30.5, 'angle')

describe('history', () => {
  it('keeps at least fifty steps and forgets the oldest', () => {
    let history = startHistory(0)
    for (let i = 1; i <= HISTORY_STEPS + 5; i += 1) history = record(history, i)
    let steps = 0
    for (; history.past.length > 0; steps += 1) history = undo(history)
    expect(steps).toBe(HISTORY_STEPS)
    expect(steps).toBeGreaterThanOrEqual(50)
    expect(history.present).toBe(5)
  })

  it('folds the keystrokes of one run into one step', () => {
    const history = typed()
    expect(history.past).toEqual([0])
    expect(undo(history).present).toBe(0)
  })

  it('begins a new step once the run is settled, or in another field', () => {
    expect(record(settle(typed()), 31, 'angle').past).toEqual([0, 30.5])
    expect(record(typed(), 31, 'depth').past).toEqual([0, 30.5])
  })

  it('goes back and forth, and a change after going back drops what lay ahead', () => {
    const history = record(record(startHistory('a'), 'b'), 'c')
    const back = undo(undo(history))
    expect(back.present).toBe('a')
    expect(redo(back).present).toBe('b')
    expect(redo(redo(redo(back))).present).toBe('c')
    expect(record(redo(back), 'd').future).toEqual([])
  })

  it('does not fold a keystroke after going back into the step before', () => {
    const history = record(undo(typed(typed())), 9, 'angle')
    expect(undo(history).present).toBe(0)
    expect(history.past).toEqual([0])
  })

  it('takes no step for no change', () => {
    const history = startHistory('a')
    expect(record(history, 'a')).toBe(history)
    expect(undo(history)).toBe(history)
    expect(redo(history)).toBe(history)
  })
})
