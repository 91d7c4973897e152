import { STANDARD_VIEWS, type StandardViewName } from '../camera/standard-views.ts'
import { cutDirections, type CutDirection } from '../cut/cut-choice.ts'
import type { ViewControl } from '../camera/view-control.ts'

/** One step of a button or key: radians, a zoom factor, pixels. */
const TURN = Math.PI / 12
const ZOOM = 1.25
const MOVE = 60

/** What acts need beyond the camera. */
export interface ActContext {
  readonly control: ViewControl
  readonly lookFrom: (name: StandardViewName) => void
  readonly fitAll: () => void
  readonly fitSelection: () => void
  readonly clear: () => void
  readonly cutOpen: (direction: CutDirection | null) => void
}

export type Heading = 'left' | 'right' | 'up' | 'down'
export type ActGroup = 'look from' | 'fit' | 'zoom' | 'turn' | 'move' | 'cut open'

export interface Act {
  readonly group: ActGroup
  /** On the button, under its group's word. */
  readonly text: string
  /** On the button where the group's word is not shown. */
  readonly alone?: string
  /** Drawn in place of the text: an arrow that way, bent for a turn. */
  readonly arrow?: Heading
  /** For screen readers and as a tip. */
  readonly name: string
  /** The key that does the same, as a person would name it. */
  readonly key?: string
  readonly needsSelection?: boolean
  /** Shown where there is little room. */
  readonly first?: boolean
  readonly run: (context: ActContext) => void
}

const looks = STANDARD_VIEWS.map(({ name }, i): Act => ({
  group: 'look from',
  text: name,
  name: name === 'below' ? 'look from below' : `look from the ${name}`,
  key: String(i + 1),
  first: name === 'corner' || name === 'top',
  run: ({ lookFrom }) => lookFrom(name),
}))

const cuts = cutDirections.map((direction): Act => ({
  group: 'cut open',
  text: direction,
  name: direction === 'edge' ? 'cut open across the selected edge' : `cut open square to ${direction}`,
  key: direction === 'edge' ? 'C' : direction,
  needsSelection: direction === 'edge',
  run: ({ cutOpen }) => cutOpen(direction),
}))

/** Every act of the camera, each with a button of its own. The part turns and moves the way its word says. */
export const ACTS: readonly Act[] = [
  ...looks,
  {
    group: 'fit',
    text: 'all',
    alone: 'fit',
    name: 'fit all',
    key: 'F',
    first: true,
    run: ({ fitAll }) => fitAll(),
  },
  {
    group: 'fit',
    text: 'selected',
    name: 'fit selected',
    key: 'shift F',
    needsSelection: true,
    run: ({ fitSelection }) => fitSelection(),
  },
  { group: 'zoom', text: '−', name: 'zoom out', key: '−', run: ({ control }) => control.zoom(1 / ZOOM) },
  { group: 'zoom', text: '+', name: 'zoom in', key: '+', run: ({ control }) => control.zoom(ZOOM) },
  { group: 'turn', text: 'left', arrow: 'left', name: 'turn left', key: '←', first: true, run: turn(1, 0) },
  {
    group: 'turn',
    text: 'right',
    arrow: 'right',
    name: 'turn right',
    key: '→',
    first: true,
    run: turn(-1, 0),
  },
  { group: 'turn', text: 'up', arrow: 'up', name: 'turn up', key: '↑', run: turn(0, -1) },
  { group: 'turn', text: 'down', arrow: 'down', name: 'turn down', key: '↓', run: turn(0, 1) },
  { group: 'move', text: 'left', arrow: 'left', name: 'move left', key: 'shift ←', run: move(-1, 0) },
  { group: 'move', text: 'right', arrow: 'right', name: 'move right', key: 'shift →', run: move(1, 0) },
  { group: 'move', text: 'up', arrow: 'up', name: 'move up', key: 'shift ↑', run: move(0, -1) },
  { group: 'move', text: 'down', arrow: 'down', name: 'move down', key: 'shift ↓', run: move(0, 1) },
  ...cuts,
  { group: 'cut open', text: 'whole', name: 'whole part', key: '0', run: ({ cutOpen }) => cutOpen(null) },
]

const ARROWS: Record<string, string> = { ArrowLeft: '←', ArrowRight: '→', ArrowUp: '↑', ArrowDown: '↓' }

/** The act of a key press while the picture has the focus; null leaves the key to the page. */
export function actOfKey(event: {
  readonly key: string
  readonly shiftKey: boolean
  readonly ctrlKey: boolean
  readonly metaKey: boolean
  readonly altKey: boolean
}): ((context: ActContext) => void) | null {
  if (event.ctrlKey || event.metaKey || event.altKey) return null
  if (event.key === 'Escape') return ({ clear }) => clear()
  const shifted = event.shiftKey && (event.key in ARROWS || event.key.toLowerCase() === 'f')
  const plain = ARROWS[event.key] ?? keySign(event.key)
  const wanted = shifted ? `shift ${plain}` : plain
  return ACTS.find(({ key }) => key === wanted)?.run ?? null
}

/** `=` and `_` are plus and minus without and with shift on many keyboards. */
function keySign(key: string): string {
  if (key === '=' || key === '+') return '+'
  if (key === '-' || key === '_') return '−'
  return key.toUpperCase()
}

function turn(azimuth: number, elevation: number) {
  return ({ control }: ActContext) => control.orbit(azimuth * TURN, elevation * TURN)
}

function move(x: number, y: number) {
  return ({ control }: ActContext) => control.pan(x * MOVE, y * MOVE)
}
