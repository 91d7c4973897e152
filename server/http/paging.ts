const DEFAULT_PAGE_SIZE = 50

export interface Page {
  readonly page: number
  readonly pageSize: number
  readonly skip: number
}

export function pageAsked(query: { readonly page?: number; readonly pageSize?: number }): Page {
  const { page = 1, pageSize = DEFAULT_PAGE_SIZE } = query
  return { page, pageSize, skip: (page - 1) * pageSize }
}

/** A pattern for LIKE that finds the text anywhere, its own wildcards taken literally. */
export function containing(text: string): string {
  return `%${text.replace(/[\\%_]/g, '\\$&')}%`
}
