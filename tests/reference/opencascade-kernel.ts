import { createRequire } from 'node:module'
import type { OpenCascadeInstance, TopoDS_Face, TopoDS_Shape } from 'replicad-opencascadejs'

/**
 * The few acts of OpenCascade that the reference test needs: solids by planes and by turning a profile, booleans,
 * volume. The kernel is compiled to WebAssembly by the package replicad-opencascadejs, single-threaded.
 */
export interface Kernel {
  /** A box that reaches ±SPAN sideways, from z = low to z = high. */
  slab(low: number, high: number): TopoDS_Shape
  /** A frustum about a vertical axis, `bottom` its radius at z = low. */
  frustum(x: number, y: number, low: number, bottom: number, high: number, top: number): TopoDS_Shape
  /** All points on the side of `towards` of the plane through a point. */
  halfSpace(through: Triple, normal: Triple, towards: Triple): TopoDS_Shape
  common(a: TopoDS_Shape, b: TopoDS_Shape): TopoDS_Shape
  cut(a: TopoDS_Shape, b: TopoDS_Shape): TopoDS_Shape
  fuse(a: TopoDS_Shape, b: TopoDS_Shape): TopoDS_Shape
  volume(shape: TopoDS_Shape): number
}

export type Triple = readonly [x: number, y: number, z: number]

/** Farther than any plate of the test reaches, mm. */
export const SPAN = 1_000

const PACKAGE = 'replicad-opencascadejs'

/** Null when the package is not installed; the test then says that it was skipped. */
export async function openCascade(): Promise<Kernel | null> {
  try {
    createRequire(import.meta.url).resolve(PACKAGE)
  } catch {
    return null
  }
  const { default: init } = await import('replicad-opencascadejs')
  return acts(await init())
}

function acts(oc: OpenCascadeInstance): Kernel {
  const point = ([x, y, z]: Triple) => new oc.gp_Pnt(x, y, z)
  const face = (corners: readonly Triple[]): TopoDS_Face => {
    const wire = new oc.BRepBuilderAPI_MakeWire()
    for (const [i, corner] of corners.entries()) {
      const next = corners[(i + 1) % corners.length]!
      wire.Add(new oc.BRepBuilderAPI_MakeEdge(point(corner), point(next)).Edge())
    }
    return new oc.BRepBuilderAPI_MakeFace(wire.Wire(), true).Face()
  }
  return {
    slab: (low, high) =>
      new oc.BRepPrimAPI_MakeBox(point([-SPAN, -SPAN, low]), point([SPAN, SPAN, high])).Shape(),
    frustum: (x, y, low, bottom, high, top) => {
      const profile = face([
        [x, y, low],
        [x + bottom, y, low],
        [x + top, y, high],
        [x, y, high],
      ])
      const axis = new oc.gp_Ax1(point([x, y, 0]), new oc.gp_Dir(0, 0, 1))
      return new oc.BRepPrimAPI_MakeRevol(profile, axis).Shape()
    },
    halfSpace: (through, [a, b, c], towards) => {
      const plane = new oc.gp_Pln(point(through), new oc.gp_Dir(a, b, c))
      const whole = new oc.BRepBuilderAPI_MakeFace(plane).Face()
      return new oc.BRepPrimAPI_MakeHalfSpace(whole, point(towards)).Solid()
    },
    common: (a, b) => new oc.BRepAlgoAPI_Common(a, b).Shape(),
    cut: (a, b) => new oc.BRepAlgoAPI_Cut(a, b).Shape(),
    fuse: (a, b) => new oc.BRepAlgoAPI_Fuse(a, b).Shape(),
    volume: (shape) => {
      const mass = new oc.GProp_GProps()
      oc.BRepGProp.VolumeProperties(shape, mass, true, false, false)
      return mass.Mass()
    },
  }
}
