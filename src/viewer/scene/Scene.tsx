import { OrthographicCamera } from '@react-three/drei'
import { useFrame, useThree } from '@react-three/fiber'
import { useEffect } from 'react'
import { Matrix4, Vector3, type OrthographicCamera as Camera } from 'three'
import { basisOf, dot, scaleOf } from '../camera/view-state.ts'
import type { ViewControl } from '../camera/view-control.ts'
import type { OverlayLayer } from '../overlay/layer.ts'
import type { Picker } from '../pick/picker.ts'
import type { MeshIndex } from './mesh-index.ts'
import type { PartScene } from './part-scene.ts'

/** Room before and behind the part along the line of sight, as a share of its radius. */
const DEPTH_ROOM = 1.1

interface SceneProps {
  readonly part: PartScene
  readonly control: ViewControl
  readonly layer: OverlayLayer
  readonly picker: Picker
  /** Gives the page a way to ask for a frame; one that does nothing when the canvas goes. */
  readonly onCanvas: (invalidate: () => void) => void
  /** Each frame; whether it shows a part. */
  readonly onFrame: (ready: boolean) => void
}

/** The inside of the canvas: the drawn part, and what is done in each frame. */
export function Scene({ part, control, layer, picker, onCanvas, onFrame }: SceneProps) {
  const invalidate = useThree((state) => state.invalidate)

  useEffect(() => {
    const ask = () => invalidate()
    const stop = control.askForFrames(ask)
    onCanvas(ask)
    ask()
    return () => {
      stop()
      onCanvas(() => {})
    }
  }, [control, onCanvas, invalidate])

  useEffect(() => () => part.dispose(), [part])

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
