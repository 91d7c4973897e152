import { Canvas } from '@react-three/fiber'
import { memo, useCallback, useEffect, useId, useMemo, useRef, useState } from 'react'
import { edgeKey } from '../../shared/walls/names.ts'
import { standardView } from './camera/standard-views.ts'
import { basisOf } from './camera/view-state.ts'
import { useGestures } from './camera/use-gestures.ts'
import { useFirstView } from './camera/use-first-view.ts'
import { useSize } from './camera/use-size.ts'
import { ViewControl } from './camera/view-control.ts'
import { actOfKey, type ActContext } from './controls/acts.ts'
import { ViewStrip } from './controls/ViewStrip.tsx'
import { chosenCut, firstCut, type CutChoice } from './cut/cut-choice.ts'
import { CutBar } from './cut/CutBar.tsx'
import { useCut } from './cut/use-cut.ts'
import { LOST_WEBGL, NO_WEBGL, NoPicture, PictureBoundary } from './Fallback.tsx'
import { OverlayLayer } from './overlay/layer.ts'
import { Overlay } from './overlay/Overlay.tsx'
import { Picker } from './pick/picker.ts'
import { indexMesh } from './scene/mesh-index.ts'
import { PartScene } from './scene/part-scene.ts'
import { Scene } from './scene/Scene.tsx'
import { useDress } from './scene/use-dress.ts'
import type { Insets, PartViewerProps } from './types.ts'
import { canDrawInThree } from './webgl.ts'

/** How near a rim a click still means its edge, px. */
const REACH = { fine: 8, coarse: 20 }
/** Narrower than this, the strip of acts folds, px. */
const FOLD_BELOW = 620
const NO_INSETS: Insets = { top: 0, right: 0, bottom: 0, left: 0 }
const KEYS =
  'Arrows turn, shift and arrows move, plus and minus zoom, F fits, 1 to 7 look from a side, X, Y, Z and C cut open, 0 makes whole, Escape clears.'

/**
 * The bevelled part in 3D, drawn as a drawing is. Turning, moving and zooming never render React: the
 * camera, the outline under the pointer and the places of the texts are written directly.
 */
export default memo(function PartViewer(props: PartViewerProps) {
  const { mesh, theme, selection, onSelect, compact = false, focusEdge = null, view = null } = props
  const { insets = NO_INSETS, onViewChange, label = 'Part in 3D', description } = props
  const [control] = useState(() => new ViewControl())
  const [picker] = useState(() => new Picker())
  const [layer] = useState(() => new OverlayLayer())
  const [part] = useState(() => new PartScene())
  const [drawable] = useState(canDrawInThree)
  const [lost, setLost] = useState(false)
  const wrapper = useRef<HTMLDivElement>(null)
  const stage = useRef<HTMLDivElement>(null)
  const askForFrame = useRef(() => {})
  const frames = useRef(0)
  const words = useId()

  // While the next mesh is computed the last one stays.
  const [shown, setShown] = useState(mesh)
  if (mesh && mesh !== shown) setShown(mesh)
  const index = useMemo(() => shown && indexMesh(shown), [shown])

  const width = useSize(stage, insets, control)
  const folded = compact || width < FOLD_BELOW
  useFirstView({ index, sized: width > 0, control, view, focusEdge })

  useEffect(
    () =>
      control.reportRest((code) => {
        wrapper.current?.setAttribute('data-view', code)
        onViewChange?.(code)
      }),
    [control, onViewChange],
  )
  useEffect(() => () => control.dispose(), [control])

  const invalidate = useCallback(() => askForFrame.current(), [])
  const onCanvas = useCallback((ask: () => void) => {
    askForFrame.current = ask
  }, [])
  const { tiltOf, breaches, thickness } = props
  const [choice, setChoice] = useState<CutChoice | null>(null)
  const cutEdge = selection[0]
  const cut = useMemo(
    () => choice && index && chosenCut(choice, index, cutEdge && index.edges.get(edgeKey(cutEdge))),
    [choice, index, cutEdge],
  )
  useDress({ part, index, picker, wrapper, tiltOf, selection, breaches, theme, thickness, invalidate })

  const area = useCut({ part, picker, index, plane: cut?.plane ?? null, invalidate })

  /** Counts frames where a test can read them, without a render. */
  const onFrame = useCallback((ready: boolean) => {
    frames.current += 1
    wrapper.current?.setAttribute('data-frames', String(frames.current))
    if (ready) wrapper.current?.setAttribute('data-ready', 'true')
  }, [])

  const onTap = useCallback(
    (x: number, y: number, toggle: boolean, coarse: boolean) => {
      const edge = picker.edgeAt(control.view, control.frame, x, y, coarse ? REACH.coarse : REACH.fine)
      if (edge) onSelect?.(edge, toggle ? 'toggle' : 'replace')
      else if (!toggle) onSelect?.(null, 'replace')
    },
    [control, picker, onSelect],
  )
  const onHover = useCallback(
    (at: { x: number; y: number } | null) => {
      const edge = at && picker.edgeAt(control.view, control.frame, at.x, at.y, REACH.fine)
      if (!part.hover(edge)) return
      if (stage.current) stage.current.style.cursor = edge ? 'pointer' : ''
      invalidate()
    },
    [control, picker, part, invalidate],
  )
  useGestures(stage, control, { onTap, onHover }, { wheelNeedsFocus: compact })

  const context = useMemo((): ActContext => {
    const all = () => (index ? [index.mesh.positions] : [])
    const chosen = () =>
      selection.flatMap((edge) => {
        const lines = index?.edges.get(edgeKey(edge))
        return lines ? [...lines.top, ...lines.bottom] : []
      })
    return {
      control,
      lookFrom: (name) => control.fit(all(), { from: standardView(name) }),
      fitAll: () => control.fit(all()),
      fitSelection: () => control.fit(chosen()),
      clear: () => onSelect?.(null, 'replace'),
      cutOpen: (direction) => {
        const edge = selection[0] && index?.edges.get(edgeKey(selection[0]))
        setChoice(direction && firstCut(direction, basisOf(control.goal).toward, edge))
      },
    }
  }, [control, index, selection, onSelect])
  const { onContext } = props
  useEffect(() => onContext?.(context), [onContext, context])

  const onKeyDown = (event: React.KeyboardEvent) => {
    if (event.target !== event.currentTarget) return
    const run = actOfKey(event)
    if (!run) return
    event.preventDefault()
    run(context)
  }

  // Made once: its tree knows nothing of React's state, so nothing that changes there reaches it.
  const canvas = useMemo(
    () => (
      <Canvas
        frameloop="demand"
        flat
        gl={{ antialias: true, alpha: true, powerPreference: 'low-power' }}
        dpr={[1, 2]}
        events={noEvents}
        resize={{ scroll: false }}
        onCreated={({ gl }) => {
          gl.localClippingEnabled = true
          watchContext(gl.domElement, setLost, invalidate)
        }}
        className="absolute! inset-0"
      >
        <Scene
          part={part}
          control={control}
          layer={layer}
          picker={picker}
          onCanvas={onCanvas}
          onFrame={onFrame}
        />
      </Canvas>
    ),
    [part, control, layer, picker, onCanvas, onFrame, invalidate],
  )

  return (
    <div
      ref={wrapper}
      data-theme={theme}
      data-viewer
      className="@container-[size] relative flex h-full w-full flex-col text-ink"
    >
      <div
        ref={stage}
        role="application"
        aria-label={label}
        aria-roledescription="3D drawing"
        aria-describedby={words}
        tabIndex={0}
        onKeyDown={onKeyDown}
        className={`relative min-h-0 flex-1 cursor-grab overflow-hidden select-none focus-visible:-outline-offset-2 ${compact ? 'touch-pan-y' : 'touch-none'}`}
      >
        {drawable ? (
          <PictureBoundary>
            {canvas}
            {lost ? (
              <NoPicture>{LOST_WEBGL}</NoPicture>
            ) : (
              <Overlay
                layer={layer}
                index={index}
                onChange={invalidate}
                selection={selection}
                breaches={breaches}
                labels={props.labels}
                balloons={props.balloons}
                onBalloon={props.onBalloon}
                event={props.event}
                scaleBar={props.scaleBar}
              />
            )}
          </PictureBoundary>
        ) : (
          <NoPicture>{NO_WEBGL}</NoPicture>
        )}
        <p id={words} className="sr-only">
          {description} {KEYS}
        </p>
      </div>
      {drawable && choice && <CutBar choice={choice} cut={cut} area={area} onChange={setChoice} />}
      {drawable && (
        <ViewStrip context={context} hasSelection={selection.length > 0} folded={folded} compact={compact} />
      )}
    </div>
  )
})

/** Fiber's own pointer handling is not needed: one listener of ours asks the search tree. */
const noEvents = () => ({ enabled: false, priority: 0 })

/** three rebuilds its own resources when the context comes back; the person is told meanwhile. */
function watchContext(
  canvas: HTMLCanvasElement,
  setLost: (lost: boolean) => void,
  invalidate: () => void,
): void {
  canvas.addEventListener('webglcontextlost', (event) => {
    event.preventDefault()
    setLost(true)
  })
  canvas.addEventListener('webglcontextrestored', () => {
    setLost(false)
    invalidate()
  })
}
