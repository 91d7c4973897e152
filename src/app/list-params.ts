import { useSearchParams } from 'react-router-dom'

export interface ListParams<K extends string> {
  readonly values: Readonly<Partial<Record<K, string>>>
  readonly sort: string | undefined
  readonly page: number
  /** Whether any filter is set. */
  readonly filtered: boolean
  /** Sets filters, '' or undefined takes one off; goes back to the first page. */
  readonly set: (change: Partial<Record<K, string | undefined>>) => void
  readonly clear: () => void
  /** The address of this list with another sort or page, for links. */
  readonly hrefWith: (change: { sort?: string; page?: number }) => string
}

/** A list's filters, sort and page live in the URL, so that a link shows the same list. */
export function useListParams<K extends string>(keys: readonly K[]): ListParams<K> {
  const [search, setSearch] = useSearchParams()
  const values: Partial<Record<K, string>> = {}
  for (const key of keys) {
    const value = search.get(key)
    if (value !== null && value !== '') values[key] = value
  }
  const page = Number(search.get('page') ?? 1)
  return {
    values,
    sort: search.get('sort') ?? undefined,
    page: Number.isInteger(page) && page >= 1 ? page : 1,
    filtered: Object.keys(values).length > 0,
    set: (change) =>
      setSearch(
        (before) => {
          const next = new URLSearchParams(before)
          next.delete('page')
          for (const [key, value] of Object.entries<string | undefined>(change)) {
            if (value === undefined || value === '') next.delete(key)
            else next.set(key, value)
          }
          return next
        },
        { replace: true },
      ),
    clear: () =>
      setSearch(
        (before) => {
          const next = new URLSearchParams(before)
          for (const key of [...keys, 'page']) next.delete(key)
          return next
        },
        { replace: true },
      ),
    hrefWith: ({ sort, page: nextPage }) => {
      const next = new URLSearchParams(search)
      next.delete('page')
      if (sort !== undefined) next.set('sort', sort)
      if (nextPage !== undefined && nextPage > 1) next.set('page', String(nextPage))
      return `?${next}`
    },
  }
}

/** A value of a closed list, or nothing where the URL holds something else. */
export function oneOf<T extends string>(value: string | undefined, allowed: readonly T[]): T | undefined {
  return allowed.find((candidate) => candidate === value)
}
