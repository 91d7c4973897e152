import { OrthographicCamera } from '@react-three/drei'
import { useFrame, useThree } from '@react-three/fiber'
import { useEffect, useLayoutEffect, useState, type RefObject } from 'react'
import { Matrix4, Vector3, type OrthographicCamera as Camera } from 'three'
import { basisOf, dot, scaleOf } from '../camera/view-state.ts'
import type { ViewControl } from '../camera/view-control.ts'
import type { OverlayLayer } from '../overlay/layer.ts'
import { readPalette } from '../palette.ts'
import type { Picker } from '../pick/picker.ts'
import type { PartViewerProps } from '../types.ts'
import type { MeshIndex } from './mesh-index.ts'
import { PartScene } from './part-scene.ts'

/** A mesh that ends this much above the bottom was cut short at its first event, mm. */
const CUT_SHORT = 1e-6
/** Room before and behind the part along the line of sight, as a share of its radius. */
const DEPTH_ROOM = 1.1

type Shown = Pick<PartViewerProps, 'tiltOf' | 'selection' | 'breaches' | 'theme' | 'thickness'>

interface SceneProps extends Shown {
  readonly index: MeshIndex | null
  readonly control: ViewControl
  readonly layer: OverlayLayer
  readonly picker: Picker
  /** The element that bears the theme. */
  readonly wrapper: RefObject<HTMLElement | null>
  /** Gives the owner of pointer events the scene to outline in, and a way to ask for a frame. */
  readonly onScene: (scene: PartScene | null, invalidate: () => void) => void
  /** Each frame; whether it shows a part. */
  readonly onFrame: (ready: boolean) => void
}

/** The inside of the canvas: passes what React knows to the objects, and runs each frame. */
export function Scene(props: SceneProps) {
  const { index, control, layer, picker, wrapper, onScene, onFrame } = props
  const { tiltOf, selection, breaches, theme, thickness } = props
  const invalidate = useThree((state) => state.invalidate)
  const [part] = useState(() => new PartScene())

  useEffect(() => {
    const ask = () => invalidate()
    const stop = control.askForFrames(ask)
    onScene(part, ask)
    return () => {
      stop()
      onScene(null, () => {})
    }
  }, [control, part, onScene, invalidate])

  useEffect(() => () => part.dispose(), [part])

  useLayoutEffect(() => {
    if (!index) return
    if (part.index !== index) {
      part.shape(index)
      picker.setIndex(index)
    }
    const palette = readPalette(wrapper.current!, theme)
    const cutShort = index.mesh.depth < thickness - CUT_SHORT
    part.dress({ palette, tiltOf, selection, breaches, cutShort })
    invalidate()
  }, [index, part, picker, wrapper, theme, thickness, tiltOf, selection, breaches, invalidate])

  useFrame(({ camera, gl }) => {
    const moving = control.step(performance.now())
    aim(camera as Camera, control, part.index)
    part.face(basisOf(control.view), scaleOf(control.view, control.frame), gl.getPixelRatio())
    layer.layout(control, picker)
    onFrame(part.index !== null)
    if (moving) invalidate()
  })

  return (
    <>
      <OrthographicCamera makeDefault manual />
      <primitive object={part.group} />
    </>
  )
}

const turned = new Matrix4()

/** Puts the camera where the view says, with depth spread over no more than the part. */
function aim(camera: Camera, { view, frame }: ViewControl, index: MeshIndex | null): void {
  const { right, up, toward } = basisOf(view)
  const scale = scaleOf(view, frame)
  const radius = (index?.radius ?? 1) * DEPTH_ROOM
  const centre = index?.centre ?? view.target
  const ahead = dot(centre, toward) - dot(view.target, toward) + radius
  camera.position.set(
    view.target[0] + toward[0] * ahead,
    view.target[1] + toward[1] * ahead,
    view.target[2] + toward[2] * ahead,
  )
  turned.makeBasis(new Vector3(...right), new Vector3(...up), new Vector3(...toward))
  camera.quaternion.setFromRotationMatrix(turned)
  camera.left = -frame.centreX / scale
  camera.right = (frame.width - frame.centreX) / scale
  camera.top = frame.centreY / scale
  camera.bottom = (frame.centreY - frame.height) / scale
  camera.near = 0
  camera.far = radius * 2
  camera.updateProjectionMatrix()
}
