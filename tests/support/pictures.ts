import type { Locator } from 'playwright-core'

/** Share of pixels that differ between two PNG pictures of one size, 0 to 1; compared inside the page. */
export async function shareChanged(canvas: Locator, before: Buffer, after: Buffer): Promise<number> {
  return canvas.page().evaluate(
    async ([a, b]) => {
      const pixelsOf = async (base64: string) => {
        const image = new Image()
        image.src = `data:image/png;base64,${base64}`
        await image.decode()
        const surface = new OffscreenCanvas(image.width, image.height)
        const context = surface.getContext('2d')!
        context.drawImage(image, 0, 0)
        return context.getImageData(0, 0, image.width, image.height)
      }
      const [first, second] = [await pixelsOf(a!), await pixelsOf(b!)]
      if (first.width !== second.width || first.height !== second.height)
        throw new Error('pictures of unlike size')
      let changed = 0
      for (let i = 0; i < first.data.length; i += 4) {
        const same = [0, 1, 2].every((k) => first.data[i + k] === second.data[i + k])
        if (!same) changed += 1
      }
      return changed / (first.width * first.height)
    },
    [before.toString('base64'), after.toString('base64')],
  )
}
