/** One act of the bench as the command box offers it. */
export interface Command {
  readonly id: string
  readonly group: string
  readonly name: string
  /** The key that does the same, as a person would name it. */
  readonly key?: string | undefined
  /** Why it cannot be done now; null when it can. */
  readonly off?: string | null
  readonly run: () => void
}

/**
 * The commands whose group and name hold every typed word, those first whose name begins with what was typed,
 * otherwise in their given order. Nothing typed: all of them.
 */
export function matching(commands: readonly Command[], typed: string): Command[] {
  const text = typed.trim().toLowerCase()
  if (text === '') return [...commands]
  const words = text.split(/\s+/)
  const found = commands.filter(({ group, name }) => {
    const hay = `${group} ${name}`.toLowerCase()
    return words.every((word) => hay.includes(word))
  })
  const begins = ({ name }: Command) => name.toLowerCase().startsWith(text)
  return [...found.filter(begins), ...found.filter((command) => !begins(command))]
}
