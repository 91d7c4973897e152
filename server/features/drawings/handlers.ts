import { createHash, randomUUID } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import type { Drawing as DrawingAnswer } from '../../../shared/api/parts.ts'
import { readingOptionsSchema } from '../../../shared/drawing/schema.ts'
import { Drawing } from '../../db/entities/drawing.ts'
import type { HandlersOf } from '../../http/call.ts'
import { safeFileName } from '../../http/download.ts'
import { notFound, Refusal } from '../../http/refusal.ts'
import type { Services } from '../../services.ts'
import { Persons } from '../people/persons.ts'
import { appendToRecord } from '../record/audit.ts'

const FALLBACK_NAME = 'drawing.dxf'

export const drawingHandlers: HandlersOf<'uploadDrawing' | 'readDrawing' | 'drawingFile'> = {
  /** Read first, stored only when it could be read: a refused file leaves nothing behind. */
  uploadDrawing: async ({ services, user, file, write }) => {
    if (!file) throw new Refusal('invalid-request', 'Send one DXF file.')
    await refuseOnFullDisk(services)
    const { bytes } = file
    const reading = await services.reader.read(bytes, readingOptionsSchema.parse({}))
    const id = randomUUID()
    return write(async (manager) => {
      const fileName = safeFileName(file.name, FALLBACK_NAME)
      const sha256 = createHash('sha256').update(bytes).digest('hex')
      const row = { id, fileName, size: bytes.byteLength, sha256, bytes, uploadedBy: user.id }
      await manager.insert(Drawing, { ...row, uploadedAt: new Date() })
      await appendToRecord(manager, user, {
        action: 'drawing.upload',
        subject: { kind: 'drawing', id, label: fileName },
        details: { sha256, size: row.size },
      })
      return { drawing: await presentDrawing(manager, id), reading }
    })
  },

  readDrawing: async ({ services, params, body }) => {
    const { manager } = services.dataSource
    const drawing = await presentDrawing(manager, params.id)
    return { drawing, reading: await services.reader.read(await drawingBytes(manager, params.id), body) }
  },

  drawingFile: async ({ services, params }) => {
    const { manager } = services.dataSource
    const { fileName } = await presentDrawing(manager, params.id)
    return { fileName, bytes: await drawingBytes(manager, params.id) }
  },
}

async function refuseOnFullDisk({ config, freeDiskBytes }: Services): Promise<void> {
  const free = await freeDiskBytes()
  if (free !== null && free < config.minFreeDiskBytes) {
    throw new Refusal(
      'disk-full',
      'The disk of the server is almost full; drawings cannot be taken. Tell who runs it.',
    )
  }
}

export async function drawingBytes(manager: EntityManager, id: string): Promise<Buffer> {
  const row = await manager.findOne(Drawing, { select: { id: true, bytes: true }, where: { id } })
  if (!row) throw notFound('This drawing')
  return row.bytes
}

export async function presentDrawing(manager: EntityManager, id: string): Promise<DrawingAnswer> {
  const row = await manager.findOneBy(Drawing, { id })
  if (!row) throw notFound('This drawing')
  const { fileName, size, sha256, uploadedBy, uploadedAt } = row
  const persons = await Persons.load(manager, [uploadedBy])
  return {
    id,
    fileName,
    size,
    sha256,
    uploadedBy: persons.of(uploadedBy),
    uploadedAt: uploadedAt.toISOString(),
  }
}
