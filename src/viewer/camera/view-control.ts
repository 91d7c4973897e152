import { fitView, type Runs } from './fit.ts'
import { encodeView } from './view-code.ts'
import { between, orbit, pan, zoomAt, type Frame, type ViewState } from './view-state.ts'

/** How long a jump to another view takes, ms: long enough to follow with the eye. */
const GLIDE = 220
/** Rest after the last movement before the view is reported, ms. */
const REST = 300

/** Spans that a zoom may reach, as multiples of the part's size. */
const CLOSEST = 1 / 400
const FARTHEST = 12

/**
 * The one owner of the camera state. It lives outside React: pointer moves and frames change it without
 * a render, and `onChange` asks for a frame.
 */
export class ViewControl {
  #view: ViewState = { azimuth: 0, elevation: Math.PI / 2, target: [0, 0, 0], span: 100 }
  #frame: Frame = { width: 1, height: 1, centreX: 0.5, centreY: 0.5, freeWidth: 1, freeHeight: 1 }
  #glide: { from: ViewState; to: ViewState; start: number } | null = null
  #size = 100
  #rest: ReturnType<typeof setTimeout> | null = null
  #onChange: () => void = () => {}
  #onRest: (code: string) => void = () => {}

  get view(): ViewState {
    return this.#view
  }

  get frame(): Frame {
    return this.#frame
  }

  /** Where the view will be when a glide ends. */
  get goal(): ViewState {
    return this.#glide?.to ?? this.#view
  }

  /** Who draws the next frame; answers how to stop asking. */
  askForFrames(ask: () => void): () => void {
    this.#onChange = ask
    return () => (this.#onChange = () => {})
  }

  /** Who is told the view's code once a movement has come to rest; answers how to stop. */
  reportRest(report: (code: string) => void): () => void {
    this.#onRest = report
    return () => (this.#onRest = () => {})
  }

  setFrame(frame: Frame): void {
    this.#frame = frame
    this.#onChange()
  }

  /** Size of the part, mm; zooming stops at multiples of it. */
  setSize(size: number): void {
    if (size > 0) this.#size = size
  }

  /** Goes to a view, gliding unless the person asked their system for less motion. */
  go(view: ViewState, glide = true): void {
    if (glide && !prefersStillness()) {
      this.#glide = { from: this.#view, to: view, start: performance.now() }
    } else {
      this.#glide = null
      this.#view = view
    }
    this.#moved()
  }

  /** Fits the runs from a direction, or from where the view is. */
  fit(runs: Runs, options: { from?: Pick<ViewState, 'azimuth' | 'elevation'>; glide?: boolean } = {}): void {
    const fitted = fitView(options.from ?? this.goal, runs, this.#frame)
    if (fitted) this.go(fitted, options.glide ?? true)
  }

  orbit(byAzimuth: number, byElevation: number): void {
    this.#set(orbit(this.#settled(), byAzimuth, byElevation))
  }

  pan(dx: number, dy: number): void {
    this.#set(pan(this.#settled(), this.#frame, dx, dy))
  }

  zoom(factor: number, x = this.#frame.centreX, y = this.#frame.centreY): void {
    const limits = { least: this.#size * CLOSEST, most: this.#size * FARTHEST }
    this.#set(zoomAt(this.#settled(), this.#frame, factor, x, y, limits))
  }

  /** Called once a frame; true while another frame is needed. */
  step(now: number): boolean {
    if (!this.#glide) return false
    const share = Math.min(1, (now - this.#glide.start) / GLIDE)
    const eased = 1 - (1 - share) ** 3
    this.#view = share === 1 ? this.#glide.to : between(this.#glide.from, this.#glide.to, eased)
    if (share === 1) this.#glide = null
    else this.#moved()
    return this.#glide !== null
  }

  dispose(): void {
    if (this.#rest) clearTimeout(this.#rest)
  }

  /** A step during a glide starts from its end, so that quick presses of a key add up. */
  #settled(): ViewState {
    return this.goal
  }

  #set(view: ViewState): void {
    this.#glide = null
    this.#view = view
    this.#moved()
  }

  #moved(): void {
    this.#onChange()
    if (this.#rest) clearTimeout(this.#rest)
    this.#rest = setTimeout(() => this.#onRest(encodeView(this.goal)), REST)
  }
}

function prefersStillness(): boolean {
  return typeof matchMedia === 'function' && matchMedia('(prefers-reduced-motion: reduce)').matches
}
