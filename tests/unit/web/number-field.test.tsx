// @vitest-environment jsdom
import { act, cleanup, fireEvent, render, screen } from '@testing-library/react'
import { useState } from 'react'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { setPreferences } from '../../../src/app/preferences.ts'
import { NumberField, type Quantity } from '../../../src/ui/NumberField.tsx'

let held: number | null = null

function Held({ start, quantity = 'length' }: { start: number | null; quantity?: Quantity }) {
  const [value, setValue] = useState(start)
  return (
    <>
      <NumberField
        label="Depth"
        quantity={quantity}
        value={value}
        onChange={(next) => {
          held = next
          setValue(next)
        }}
      />
      <button onClick={() => setValue(7)}>other</button>
    </>
  )
}
const box = () => screen.getByRole<HTMLInputElement>('textbox')
const type = (text: string) => fireEvent.change(box(), { target: { value: text } })

beforeEach(() => setPreferences({ unit: 'mm' }))
afterEach(cleanup)

describe('a length', () => {
  it.each([
    ['12,5', 12.5],
    ['1 1/2 in', 38.1],
    ['3/8"', 9.525],
    ['38.1mm', 38.1],
  ])('typed as %s is %f mm, and said back', (text, mm) => {
    render(<Held start={null} />)
    type(text)
    expect(held).toBeCloseTo(mm, 9)
    expect(screen.getByRole('status').textContent).toMatch(/^= /)
  })

  it('asks where a comma can mean two things, and takes the answer', () => {
    render(<Held start={null} />)
    type('1,234')
    expect(held).toBeNull()
    fireEvent.click(screen.getByRole('button', { name: '1234 mm' }))
    expect(held).toBe(1234)
  })

  it('keeps what was typed when it is not a number, and says what to do', () => {
    render(<Held start={25} />)
    type('12..5')
    expect(held).toBeNull()
    expect(box().value).toBe('12..5')
    expect(screen.getByRole('alert').textContent).toContain('not a number')
    expect(box().getAttribute('aria-invalid')).toBe('true')
  })

  it('shows the unit asked for without touching the value', () => {
    render(<Held start={1 / 3} />)
    held = -1
    act(() => setPreferences({ unit: 'in' }))
    expect(box().value).toBe('0.0131')
    fireEvent.blur(box())
    expect(held).toBe(-1)
  })

  it('follows a value that changed elsewhere', () => {
    render(<Held start={25} />)
    type('26')
    fireEvent.click(screen.getByText('other'))
    expect(box().value).toBe('7')
  })
})

it('reads an angle in degrees and minutes', () => {
  render(<Held start={30} quantity="angle" />)
  type("45° 30'")
  expect(held).toBe(45.5)
})
