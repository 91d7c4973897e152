/** Finding room for texts on a picture: greedy by importance, steady from frame to frame. CSS pixels. */
export interface Rect {
  readonly left: number
  readonly top: number
  readonly width: number
  readonly height: number
}

export interface Place {
  /** Centre of the text. */
  readonly x: number
  readonly y: number
}

export interface Wish {
  readonly width: number
  readonly height: number
  /** Best first. */
  readonly places: readonly Place[]
  /** The place taken in the last frame; kept while it is free, so that nothing flickers. */
  readonly last: number | null
  /** Shown even if it collides: it then takes its first place. */
  readonly must?: boolean
}

/** Air kept between two texts. */
const AIR = 3

/**
 * The index of the place that each wish gets, or null where none is free. Earlier wishes go first;
 * `taken` is kept clear by all.
 */
export function placeAll(wishes: readonly Wish[], taken: readonly Rect[], bounds: Rect): (number | null)[] {
  const held: Rect[] = [...taken]
  return wishes.map((wish) => {
    const order = wish.places.map((_, i) => i)
    if (wish.last !== null && wish.last < order.length) order.unshift(wish.last)
    const free = order.find((i) => {
      const rect = rectOf(wish, i)
      return within(rect, bounds) && !held.some((other) => collide(rect, other))
    })
    const chosen = free ?? (wish.must && wish.places.length > 0 ? 0 : null)
    if (chosen !== null) held.push(rectOf(wish, chosen))
    return chosen
  })
}

export function rectOf(wish: Pick<Wish, 'width' | 'height' | 'places'>, place: number): Rect {
  const { x, y } = wish.places[place]!
  return { left: x - wish.width / 2, top: y - wish.height / 2, width: wish.width, height: wish.height }
}

export function collide(a: Rect, b: Rect): boolean {
  return (
    a.left < b.left + b.width + AIR &&
    b.left < a.left + a.width + AIR &&
    a.top < b.top + b.height + AIR &&
    b.top < a.top + a.height + AIR
  )
}

function within(rect: Rect, bounds: Rect): boolean {
  return (
    rect.left >= bounds.left &&
    rect.top >= bounds.top &&
    rect.left + rect.width <= bounds.left + bounds.width &&
    rect.top + rect.height <= bounds.top + bounds.height
  )
}
