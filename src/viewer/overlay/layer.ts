import type { EdgeRef } from '../../../shared/walls/types.ts'
import { basisOf, projector, scaleOf, type ScreenPoint, type Vec3 } from '../camera/view-state.ts'
import type { ViewControl } from '../camera/view-control.ts'
import type { Picker } from '../pick/picker.ts'
import { DISC_RADIUS } from '../scene/corner-discs.ts'
import { drawAxes } from './axes.ts'
import {
  balloonLeader,
  balloonPlaces,
  BALLOON_RADIUS,
  besidePlaces,
  labelLeader,
  squareRound,
} from './balloon.ts'
import { placeAll, rectOf, type Rect, type Wish } from './place.ts'
import { readingOf } from './reading.ts'
import { barLength } from './scale-bar.ts'
import { labelPlaces, type LabelPlace, type Station } from './stations.ts'

/** Above this many triangles, labels are not tested for being hidden: the search tree waits for the pointer. */
const TEST_HIDDEN_UP_TO = 60_000

/** An edge shorter than this on screen has no label until it is selected or zoomed in on, px. */
const SHORTEST_EDGE = 24

/** Corner of the picture that the scale bar holds, px. */
const BAR_ROOM = { width: 160, height: 34 }

/** Sine of the elevation under which the plate's faces are seen on edge. */
const GRAZING = 0.03

interface LabelNode {
  readonly element: HTMLElement
  readonly edge: EdgeRef
  readonly stations: readonly Station[]
  /** Of the edge, mm. */
  readonly length: number
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

/** One frame's work: what is taken so far, and the hairlines to draw. */
interface Layout {
  readonly project: (p: Vec3) => ScreenPoint
  readonly bounds: Rect
  readonly taken: Rect[]
  readonly leaders: string[]
}

export interface Fixed {
  readonly leaders: SVGPathElement | null
  readonly event: HTMLElement | null
  readonly eventText: HTMLElement | null
  readonly bar: HTMLElement | null
  readonly barText: HTMLElement | null
  readonly reading: HTMLElement | null
  readonly axes: SVGGElement | null
}

/** Moves the texts over the picture, once a frame, by writing to the elements that React made. */
export class OverlayLayer {
  #labels: LabelNode[] = []
  #balloons: BalloonNode[] = []
  #eventSize = { width: 0, height: 0 }
  #eventPlace: number | null = null
  #fixed: Fixed = {
    leaders: null,
    event: null,
    eventText: null,
    bar: null,
    barText: null,
    reading: null,
    axes: null,
  }
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
  setLabels(nodes: readonly Omit<LabelNode, 'width' | 'height' | 'last'>[]): void {
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

  /** Puts every text in its place for the view as it is now. */
  layout(control: ViewControl, picker: Picker): void {
    const { view, frame } = control
    const project = projector(view, frame)
    const bounds: Rect = {
      left: frame.centreX - frame.freeWidth / 2,
      top: frame.centreY - frame.freeHeight / 2,
      width: frame.freeWidth,
      height: frame.freeHeight,
    }
    const scene = { project, bounds, taken: [] as Rect[], leaders: [] as string[] }
    this.#placeMarks(scene)
    this.#placeBalloons(scene, { x: frame.centreX, y: frame.centreY })
    this.#placeEventText(scene)
    this.#placeLabels(scene, scaleOf(view, frame), basisOf(view).toward, picker)
    this.#fixed.leaders?.setAttribute('d', scene.leaders.join(''))
    this.#writeBar(scaleOf(view, frame))
    if (this.#fixed.reading) write(this.#fixed.reading, readingOf(view))
    if (this.#fixed.axes) drawAxes(this.#fixed.axes, basisOf(view))
  }

  /** What stands where it stands: discs, the event's mark, the scale bar. */
  #placeMarks({ project, bounds, taken }: Layout): void {
    taken.push(...this.#corners.map((corner) => squareRound(project(corner), DISC_RADIUS)))
    if (this.#event && this.#fixed.event) {
      const at = project(this.#event)
      taken.push(squareRound(at, BALLOON_RADIUS))
      move(this.#fixed.event, at)
    }
    if (this.#fixed.bar) {
      const { width, height } = BAR_ROOM
      taken.push({ left: bounds.left, top: bounds.top + bounds.height - height, width, height })
    }
  }

  #placeBalloons({ project, bounds, taken, leaders }: Layout, middle: { x: number; y: number }): void {
    const size = BALLOON_RADIUS * 2
    const points = this.#balloons.map(({ at }) => project(at))
    const wishes = this.#balloons.map(({ last }, i): Wish => {
      return { width: size, height: size, places: balloonPlaces(points[i]!, middle), last, must: true }
    })
    placeAll(wishes, taken, bounds).forEach((place, i) => {
      const node = this.#balloons[i]!
      node.last = place
      const inside = place !== null && contains(bounds, points[i]!)
      node.element.style.visibility = inside ? 'visible' : 'hidden'
      if (!inside) return
      const at = wishes[i]!.places[place]!
      const leader = balloonLeader(points[i]!, at)
      move(node.element, at)
      leaders.push(leader.path)
      taken.push(rectOf(wishes[i]!, place), ...leader.taken)
    })
  }

  #placeEventText({ project, bounds, taken }: Layout): void {
    if (!this.#event || !this.#fixed.eventText) return
    const places = besidePlaces(project(this.#event), this.#eventSize)
    const wish: Wish = { ...this.#eventSize, places, last: this.#eventPlace, must: true }
    this.#eventPlace = placeAll([wish], taken, bounds)[0] ?? 0
    move(this.#fixed.eventText, places[this.#eventPlace]!)
    taken.push(rectOf(wish, this.#eventPlace))
  }

  #placeLabels(layout: Layout, scale: number, toward: Vec3, picker: Picker): void {
    const { project, bounds, taken, leaders } = layout
    const wishes = this.#labels.map((label): Wish & { places: LabelPlace[] } => ({
      width: label.width,
      height: label.height,
      last: label.last,
      places:
        label.must || (label.length * scale >= SHORTEST_EDGE && this.#inSight(label, picker, toward))
          ? labelPlaces(label.stations, project, scale, label)
          : [],
    }))
    placeAll(wishes, taken, bounds).forEach((place, i) => {
      const label = this.#labels[i]!
      label.last = place
      label.element.style.visibility = place === null ? 'hidden' : 'visible'
      if (place === null) return
      const at = wishes[i]!.places[place]!
      move(label.element, at)
      if (at.apart) leaders.push(labelLeader(at.anchor, at, label))
    })
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
}

function contains(rect: Rect, { x, y }: { x: number; y: number }): boolean {
  return x >= rect.left && y >= rect.top && x <= rect.left + rect.width && y <= rect.top + rect.height
}

function move(element: HTMLElement, { x, y }: { x: number; y: number }): void {
  element.style.transform = `translate(${x.toFixed(1)}px, ${y.toFixed(1)}px) translate(-50%, -50%)`
}

function write(element: HTMLElement, text: string): void {
  if (element.textContent !== text) element.textContent = text
}
