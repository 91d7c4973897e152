import { FrontSide, ShaderMaterial, Vector3 } from 'three'
import type { Palette, Rgb } from '../palette.ts'

/**
 * Flat paint for the faces: the vertex colour as it is (tokens are already in the screen's colour space),
 * a little darker the further the plane turns from the light so that neighbouring facets read as planes,
 * and the breach hatch ruled over it in screen space, so that its lines keep their pitch at any zoom.
 */
const vertexShader = /* glsl */ `
#include <clipping_planes_pars_vertex>
attribute vec4 paint;
varying vec4 vPaint;
varying vec3 vNormal;
void main() {
  vPaint = paint;
  vNormal = normalMatrix * normal;
  vec4 mvPosition = modelViewMatrix * vec4(position, 1.0);
  gl_Position = projectionMatrix * mvPosition;
  #include <clipping_planes_vertex>
}`

const fragmentShader = /* glsl */ `
#include <clipping_planes_pars_fragment>
uniform vec3 hatch;
uniform vec3 sheet;
uniform float veil;
uniform float pixelRatio;
uniform float shade;
varying vec4 vPaint;
varying vec3 vNormal;
const vec3 light = normalize(vec3(-0.35, 0.75, 0.65));
const float pitch = 9.0;
const float halfWidth = 0.85;
void main() {
  #include <clipping_planes_fragment>
  float facing = dot(normalize(vNormal), light);
  vec3 colour = vPaint.rgb * (1.0 - shade * (0.5 - 0.5 * facing));
  if (vPaint.a > 0.5) {
    float across = (gl_FragCoord.x - gl_FragCoord.y) / pixelRatio / 1.41421356;
    float apart = abs(fract(across / pitch) - 0.5) * pitch;
    colour = mix(colour, sheet, veil);
    colour = mix(hatch, colour, smoothstep(halfWidth - 0.35, halfWidth + 0.35, apart));
  }
  gl_FragColor = vec4(colour, 1.0);
}`

/** How far a hatched wall steps back toward the sheet: in the dark theme both are bright and would merge. */
const VEIL = { paper: 0, tank: 0.5 }

/** Darkening of a plane that faces away from the light, as a share. */
const SHADE = { paper: 0.2, tank: 0.34 }

export class FaceMaterial extends ShaderMaterial {
  constructor() {
    super({
      vertexShader,
      fragmentShader,
      side: FrontSide,
      clipping: true,
      uniforms: {
        hatch: { value: new Vector3() },
        sheet: { value: new Vector3() },
        veil: { value: 0 },
        pixelRatio: { value: 1 },
        shade: { value: 0 },
      },
      // Faces step back by the least amount that the depth buffer tells apart, so that lines on them win.
      polygonOffset: true,
      polygonOffsetFactor: 1,
      polygonOffsetUnits: 1,
    })
  }

  dress({ breach, sheet, theme }: Palette): void {
    setRgb(this.uniforms.hatch!.value as Vector3, breach)
    setRgb(this.uniforms.sheet!.value as Vector3, sheet)
    this.uniforms.veil!.value = VEIL[theme]
    this.uniforms.shade!.value = SHADE[theme]
  }

  setPixelRatio(ratio: number): void {
    this.uniforms.pixelRatio!.value = ratio
  }
}

/** A colour of the screen as the shaders take it, 0 to 1. */
export function setRgb(vector: Vector3, [r, g, b]: Rgb): void {
  vector.set(r / 255, g / 255, b / 255)
}
