import { BufferAttribute, BufferGeometry, Points, ShaderMaterial, Vector3 } from 'three'
import type { Rgb } from '../palette.ts'
import { setRgb } from './face-material.ts'

/** Hatched discs of a fixed size on screen, one at every breached corner. */
export const DISC_RADIUS = 15

const vertexShader = /* glsl */ `
uniform float pixelRatio;
uniform float radius;
void main() {
  gl_Position = projectionMatrix * modelViewMatrix * vec4(position, 1.0);
  gl_PointSize = (radius + 1.5) * 2.0 * pixelRatio;
}`

const fragmentShader = /* glsl */ `
uniform vec3 colour;
uniform vec3 sheet;
uniform float pixelRatio;
uniform float radius;
const float pitch = 6.0;
const float veil = 0.62;
void main() {
  vec2 at = (gl_PointCoord - 0.5) * (radius + 1.5) * 2.0;
  float out_ = length(at);
  float ring = 1.0 - smoothstep(0.4, 1.1, abs(out_ - radius + 0.5));
  float across = (gl_FragCoord.x - gl_FragCoord.y) / pixelRatio / 1.41421356;
  float apart = abs(fract(across / pitch) - 0.5) * pitch;
  float ruled = (1.0 - smoothstep(0.3, 0.95, apart)) * (1.0 - smoothstep(radius - 1.0, radius, out_));
  float cover = max(ring, ruled * 0.9);
  // The sheet's colour under the hatch, or it would be lost on a wall of a bright tilt.
  float ground = veil * (1.0 - smoothstep(radius - 1.0, radius, out_));
  float alpha = cover + ground * (1.0 - cover);
  if (alpha < 0.02) discard;
  gl_FragColor = vec4(mix(sheet, colour, cover / alpha), alpha);
}`

export class CornerDiscs {
  readonly object: Points
  readonly #geometry = new BufferGeometry()
  readonly #material: ShaderMaterial

  constructor() {
    this.#material = new ShaderMaterial({
      vertexShader,
      fragmentShader,
      transparent: true,
      // A breach is never hidden by the part itself.
      depthTest: false,
      depthWrite: false,
      uniforms: {
        colour: { value: new Vector3() },
        sheet: { value: new Vector3() },
        pixelRatio: { value: 1 },
        radius: { value: DISC_RADIUS },
      },
    })
    this.object = new Points(this.#geometry, this.#material)
    this.object.frustumCulled = false
    this.object.renderOrder = 20
    this.fill([], [0, 0, 0])
  }

  fill(points: readonly (readonly [number, number, number])[], origin: readonly [number, number, number]) {
    this.#geometry.dispose()
    const flat = new Float32Array(
      points.flatMap((p) => [p[0] - origin[0], p[1] - origin[1], p[2] - origin[2]]),
    )
    this.#geometry.setAttribute('position', new BufferAttribute(flat, 3))
    this.object.visible = points.length > 0
  }

  colour(breach: Rgb, sheet: Rgb): void {
    setRgb(this.#material.uniforms.colour!.value as Vector3, breach)
    setRgb(this.#material.uniforms.sheet!.value as Vector3, sheet)
  }

  setPixelRatio(ratio: number): void {
    this.#material.uniforms.pixelRatio!.value = ratio
  }

  dispose(): void {
    this.#geometry.dispose()
    this.#material.dispose()
  }
}
