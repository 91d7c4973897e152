import type { EdgeRef } from '../../../shared/body/types.ts'
import { basisOf, projector, scaleOf, type Vec3, type ViewState } from '../camera/view-state.ts'
import type { ViewControl } from '../camera/view-control.ts'
import type { Picker } from '../pick/picker.ts'
import { DISC_RADIUS } from '../scene/corner-discs.ts'
import { placeAll, rectOf, type Rect, type Wish } from './place.ts'
import { barLength } from './scale-bar.ts'
import { labelPlaces, type LabelPlace, type Station } from './stations.ts'

/** Radius of a balloon, px; the button round it is larger where fingers are used. */
export const BALLOON_RADIUS = 11
/** How far a balloon stands from its place, px, and the turns away from "outward" that are tried. */
const BALLOON_ARMS = [34, 52]
const BALLOON_TURNS = [0, 0.6, -0.6, 1.2, -1.2, 2.2, -2.2]
/** Points of a leader, as shares of it, that labels keep clear of. */
const LEADER_KEPT_CLEAR = [0.1, 0.4, 0.7]
/** Above this many triangles, labels are not tested for being hidden: the search tree waits for the pointer. */
const TEST_HIDDEN_UP_TO = 60_000

/** Sine of the elevation under which the plate's faces are seen on edge. */
const GRAZING = 0.03

interface LabelNode {
  readonly element: HTMLElement
  readonly edge: EdgeRef
  readonly stations: readonly Station[]
  /** Shown even where its edge is hidden. */
  readonly must: boolean
  readonly width: number
  readonly height: number
  last: number | null
}

interface BalloonNode {
  readonly element: HTMLElement
  readonly at: Vec3
  last: number | null
}

export interface Fixed {
  readonly leaders: SVGPathElement | null
  readonly event: HTMLElement | null
  readonly eventText: HTMLElement | null
  readonly bar: HTMLElement | null
  readonly barText: HTMLElement | null
  readonly reading: HTMLElement | null
}

/** Moves the texts over the picture, once a frame, by writing to the elements that React made. */
export class OverlayLayer {
  #labels: LabelNode[] = []
  #balloons: BalloonNode[] = []
  #eventSize = { width: 0, height: 0 }
  #eventPlace: number | null = null
  #fixed: Fixed = { leaders: null, event: null, eventText: null, bar: null, barText: null, reading: null }
  #event: Vec3 | null = null
  #corners: readonly Vec3[] = []
  #unit: { unit: number; text: (value: number) => string } | null = null
  #testHidden = true

  setFixed(fixed: Fixed): void {
    this.#fixed = fixed
    const text = fixed.eventText
    this.#eventSize = { width: text?.offsetWidth ?? 0, height: text?.offsetHeight ?? 0 }
  }

  /** Elements and where they belong; sizes are measured here, once, not in a frame. */
  setLabels(nodes: readonly Pick<LabelNode, 'element' | 'edge' | 'stations' | 'must'>[]): void {
    const before = new Map(this.#labels.map((label) => [label.element, label.last]))
    this.#labels = nodes.map((node) => ({
      ...node,
      width: node.element.offsetWidth,
      height: node.element.offsetHeight,
      last: before.get(node.element) ?? null,
    }))
  }

  setBalloons(nodes: readonly { element: HTMLElement; at: Vec3 }[]): void {
    const before = new Map(this.#balloons.map((balloon) => [balloon.element, balloon.last]))
    this.#balloons = nodes.map((node) => ({ ...node, last: before.get(node.element) ?? null }))
  }

  setMarks(marks: { event: Vec3 | null; corners: readonly Vec3[]; triangles: number }): void {
    this.#event = marks.event
    this.#corners = marks.corners
    this.#testHidden = marks.triangles <= TEST_HIDDEN_UP_TO
  }

  setUnit(unit: { unit: number; text: (value: number) => string } | null): void {
    this.#unit = unit
  }

  layout(control: ViewControl, picker: Picker): void {
    const { view, frame } = control
    const project = projector(view, frame)
    const scale = scaleOf(view, frame)
    const bounds: Rect = {
      left: frame.centreX - frame.freeWidth / 2,
      top: frame.centreY - frame.freeHeight / 2,
      width: frame.freeWidth,
      height: frame.freeHeight,
    }
    const leaders: string[] = []
    const taken = this.#corners.map((corner) => square(project(corner), DISC_RADIUS))
    if (this.#event) {
      const at = project(this.#event)
      taken.push(square(at, BALLOON_RADIUS))
      if (this.#fixed.event) move(this.#fixed.event, at.x, at.y)
    }
    if (this.#fixed.bar)
      taken.push({ left: bounds.left, top: bounds.top + bounds.height - 34, width: 160, height: 34 })

    const middle = { x: frame.centreX, y: frame.centreY }
    const balloonWishes = this.#balloons.map(({ at, last }): Wish & { from: { x: number; y: number } } => {
      const from = project(at)
      const size = BALLOON_RADIUS * 2
      return { width: size, height: size, places: balloonPlaces(from, middle), last, must: true, from }
    })
    placeAll(balloonWishes, taken, bounds).forEach((place, i) => {
      const node = this.#balloons[i]!
      const wish = balloonWishes[i]!
      node.last = place
      const inside = place !== null && contains(bounds, wish.from)
      node.element.style.visibility = inside ? 'visible' : 'hidden'
      if (!inside) return
      const { x, y } = wish.places[place]!
      move(node.element, x, y)
      taken.push(rectOf(wish, place))
      const reach = Math.hypot(x - wish.from.x, y - wish.from.y)
      const share = 1 - BALLOON_RADIUS / reach
      leaders.push(line(wish.from, { x: mix(wish.from.x, x, share), y: mix(wish.from.y, y, share) }))
      for (const at of LEADER_KEPT_CLEAR) {
        taken.push(square({ x: mix(wish.from.x, x, at * share), y: mix(wish.from.y, y, at * share) }, 1))
      }
    })

    if (this.#event && this.#fixed.eventText) {
      const wish = {
        ...this.#eventSize,
        places: besidePlaces(project(this.#event), this.#eventSize),
        must: true,
      }
      this.#eventPlace = placeAll([{ ...wish, last: this.#eventPlace }], taken, bounds)[0] ?? 0
      const at = wish.places[this.#eventPlace]!
      move(this.#fixed.eventText, at.x, at.y)
      taken.push(rectOf(wish, this.#eventPlace))
    }

    const { toward } = basisOf(view)
    const wishes = this.#labels.map((label): Wish & { places: LabelPlace[] } => ({
      width: label.width,
      height: label.height,
      last: label.last,
      places:
        label.must || this.#inSight(label, picker, toward)
          ? labelPlaces(label.stations, project, scale, label)
          : [],
    }))
    placeAll(wishes, taken, bounds).forEach((place, i) => {
      const label = this.#labels[i]!
      label.last = place
      label.element.style.visibility = place === null ? 'hidden' : 'visible'
      if (place === null) return
      const at = wishes[i]!.places[place]!
      move(label.element, at.x, at.y)
      const middleStation = label.stations[0]!
      const hidden =
        this.#testHidden &&
        picker.hides(middleStation.top, toward) &&
        picker.hides(middleStation.bottom, toward)
      label.element.dataset.hidden = String(hidden)
      if (at.apart) leaders.push(line(at.anchor, shorten(at.anchor, at, label)))
    })
    this.#fixed.leaders?.setAttribute('d', leaders.join(''))
    this.#writeBar(scale)
    this.#writeReading(control)
  }

  /** An edge is in sight if its wall is, or a rim that is not seen merely along the plate's face. */
  #inSight({ edge, stations }: LabelNode, picker: Picker, toward: Vec3): boolean {
    if (!this.#testHidden) return true
    const { rims, middle } = stations[0]!
    if (picker.sees(edge, middle, toward)) return true
    if (Math.abs(toward[2]) < GRAZING) return false
    return picker.sees(edge, toward[2] > 0 ? rims[0]! : rims.at(-1)!, toward)
  }

  #writeBar(scale: number): void {
    if (!this.#unit || !this.#fixed.bar || !this.#fixed.barText) return
    const { value, pixels } = barLength(scale, this.#unit.unit)
    this.#fixed.bar.style.width = `${pixels.toFixed(1)}px`
    write(this.#fixed.barText, this.#unit.text(value))
  }

  #writeReading({ view }: ViewControl): void {
    if (!this.#fixed.reading) return
    write(this.#fixed.reading, readingOf(view))
  }
}

/** Where the eye is, in words. */
export function readingOf({ azimuth, elevation }: Pick<ViewState, 'azimuth' | 'elevation'>): string {
  const round = Math.round((azimuth * 180) / Math.PI)
  const height = Math.round((elevation * 180) / Math.PI)
  const side = round === 0 ? 'the front' : `${Math.abs(round)}° ${round > 0 ? 'right' : 'left'}`
  return `from ${side}, ${Math.abs(height)}° ${height < 0 ? 'below' : 'above'}`
}

function balloonPlaces(from: { x: number; y: number }, middle: { x: number; y: number }) {
  const outward = Math.atan2(from.y - middle.y, from.x - middle.x)
  return BALLOON_ARMS.flatMap((arm) =>
    BALLOON_TURNS.map((turn) => ({
      x: from.x + Math.cos(outward + turn) * arm,
      y: from.y + Math.sin(outward + turn) * arm,
    })),
  )
}

/** Round a mark: right, left, below, above, each nearer and farther. */
function besidePlaces(
  { x, y }: { x: number; y: number },
  { width, height }: { width: number; height: number },
) {
  return [3, 14, 30].flatMap((gap) => {
    const dx = BALLOON_RADIUS + gap + width / 2
    const dy = BALLOON_RADIUS + gap + height / 2
    return [
      { x: x + dx, y },
      { x: x - dx, y },
      { x, y: y + dy },
      { x, y: y - dy },
    ]
  })
}

/** The end of a leader: where the straight line from the anchor meets the text's box. */
function shorten(
  anchor: { x: number; y: number },
  at: { x: number; y: number },
  box: { width: number; height: number },
): { x: number; y: number } {
  const dx = at.x - anchor.x
  const dy = at.y - anchor.y
  const inside = Math.min(
    dx === 0 ? Infinity : box.width / 2 / Math.abs(dx),
    dy === 0 ? Infinity : box.height / 2 / Math.abs(dy),
  )
  const share = Math.max(0, 1 - inside)
  return { x: anchor.x + dx * share, y: anchor.y + dy * share }
}

function line(from: { x: number; y: number }, to: { x: number; y: number }): string {
  return `M${from.x.toFixed(1)} ${from.y.toFixed(1)}L${to.x.toFixed(1)} ${to.y.toFixed(1)}`
}

function square(at: { x: number; y: number }, radius: number): Rect {
  return { left: at.x - radius, top: at.y - radius, width: radius * 2, height: radius * 2 }
}

function contains(rect: Rect, { x, y }: { x: number; y: number }): boolean {
  return x >= rect.left && y >= rect.top && x <= rect.left + rect.width && y <= rect.top + rect.height
}

/** Elements are centred on their place by a −50 % margin of their own, set in their class. */
function move(element: HTMLElement, x: number, y: number): void {
  element.style.transform = `translate(${x.toFixed(1)}px, ${y.toFixed(1)}px) translate(-50%, -50%)`
}

function write(element: HTMLElement, text: string): void {
  if (element.textContent !== text) element.textContent = text
}

function mix(a: number, b: number, share: number): number {
  return a + (b - a) * share
}
