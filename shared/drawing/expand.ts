import type { Container, DrawingDocument } from './document.ts'
import type { DrawnEntity, InsertShape } from './entities.ts'
import { DrawingError } from './errors.ts'
import { MAX_ENTITIES, MAX_NESTING } from './limits.ts'
import type { NoticeBook } from './notices.ts'
import { compose, mapPoint, MIRROR_X, moving, scaling, turning, type Transform } from './transform.ts'

/** An entity where it lies in the drawing. */
export interface PlacedEntity {
  readonly entity: Exclude<DrawnEntity, { type: 'INSERT' }>
  readonly layer: string
  /** From the entity's coordinates (extrusion not yet applied) to the drawing's, mm. */
  readonly map: Transform
}

/** Entities on this layer of a block take the layer of the block's insertion. */
const INHERITED_LAYER = '0'

export interface ExpansionSink {
  placed(entity: PlacedEntity): void
  ignored(type: string, layer: string): void
}

/**
 * Places blocks within blocks. What it would come to is counted before anything is placed, so that a small file
 * cannot grow without bound.
 *
 * @throws DrawingError drawing-block-recursion, drawing-too-many-entities
 */
export function expandBlocks(
  document: DrawingDocument,
  toMillimetres: number,
  notices: NoticeBook,
  sink: ExpansionSink,
): void {
  refuseUnbounded(document)
  const place = (container: Container, map: Transform, inherited: string | null) => {
    const layerOf = (own: string) => (inherited !== null && own === INHERITED_LAYER ? inherited : own)
    for (const { type, layer } of container.ignored) sink.ignored(type, layerOf(layer))
    for (const entity of container.entities) {
      const layer = layerOf(entity.record.layer)
      if (entity.type !== 'INSERT') sink.placed({ entity, layer, map })
      else placeInsert(entity, map, layer)
    }
  }
  const placeInsert = (insert: DrawnEntity & InsertShape, map: Transform, layer: string) => {
    const block = document.blocks.get(insert.block.toUpperCase())
    const at = mapPoint(map, insert.at)
    if (!block) return notices.note('block-missing', at)
    if (insert.record.normal === 'askew') return notices.note('not-planar', at)
    notices.note('block-expanded', at)
    const outer = insert.record.normal === 'down' ? compose(map, MIRROR_X) : map
    const turned = compose(outer, moving(insert.at), turning(insert.rotation))
    const inner = compose(
      scaling(insert.scale.x, insert.scale.y),
      moving({ x: -block.base.x, y: -block.base.y }),
    )
    for (let row = 0; row < insert.rows; row++) {
      for (let column = 0; column < insert.columns; column++) {
        const step = moving({ x: column * insert.spacing.x, y: row * insert.spacing.y })
        place(block, compose(turned, step, inner), layer)
      }
    }
  }
  place(document.model, scaling(toMillimetres, toMillimetres), null)
}

function refuseUnbounded(document: DrawingDocument): void {
  const costs = new Map<string, number>()
  const open = new Set<string>()
  const costOf = (container: Container): number =>
    container.entities.reduce((sum, entity) => sum + entityCost(entity), container.ignored.length)
  const entityCost = (entity: DrawnEntity): number => {
    if (entity.type !== 'INSERT') return 1
    const name = entity.block.toUpperCase()
    const block = document.blocks.get(name)
    if (!block) return 1
    if (open.has(name)) throw nesting('contains itself', name)
    if (open.size >= MAX_NESTING) throw nesting(`lies more than ${MAX_NESTING} blocks deep`, name)
    let cost = costs.get(name)
    if (cost === undefined) {
      open.add(name)
      cost = costOf(block)
      open.delete(name)
      costs.set(name, cost)
    }
    return entity.rows * entity.columns * (1 + cost)
  }
  const total = costOf(document.model)
  if (total > MAX_ENTITIES) {
    throw new DrawingError(
      'drawing-too-many-entities',
      `With its blocks placed the drawing holds more than ${MAX_ENTITIES} entities. Export only the part.`,
    )
  }
}

function nesting(why: string, name: string): DrawingError {
  return new DrawingError(
    'drawing-block-recursion',
    `The block ${name.slice(0, 60)} ${why}. Explode the blocks before exporting.`,
  )
}
