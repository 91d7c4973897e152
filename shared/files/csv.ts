/**
 * A table as RFC 4180 text: CRLF, quotes where needed, and no cell that a spreadsheet would run as a formula.
 */

export type Cell = string | number | null

export function csvText(rows: readonly (readonly Cell[])[]): string {
  return rows.map((row) => `${row.map(cellText).join(',')}\r\n`).join('')
}

function cellText(cell: Cell): string {
  if (cell === null) return ''
  if (typeof cell === 'number') return Object.is(cell, -0) ? '0' : String(cell)
  const safe = runsAsFormula(cell) ? `'${cell}` : cell
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe
}

/** Spreadsheets run what starts so, also after a quote or a tab; an apostrophe makes it text. */
function runsAsFormula(text: string): boolean {
  return /^[\s]*[=+\-@|]/.test(text) || /^[\t\r\n]/.test(text)
}
