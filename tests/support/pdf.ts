import { getDocument, OPS } from 'pdfjs-dist/legacy/build/pdf.mjs'

/** What a PDF holds, read by pdfjs: the text of each page, and the width and height in points of each path. */
export interface PdfContent {
  readonly pages: readonly string[]
  readonly paths: readonly { readonly width: number; readonly height: number }[]
}

type Matrix = readonly number[]

const IDENTITY: Matrix = [1, 0, 0, 1, 0, 0]

function product(m: Matrix, n: Matrix): Matrix {
  const [a, b, c, d, e, f] = m as [number, number, number, number, number, number]
  const [g, h, i, j, k, l] = n as [number, number, number, number, number, number]
  return [a * g + c * h, b * g + d * h, a * i + c * j, b * i + d * j, a * k + c * l + e, b * k + d * l + f]
}

/** Axis-parallel scale is all that a printed page uses: the box's sides grow by the matrix's own. */
function sizeUnder([a, b, c, d]: Matrix, width: number, height: number) {
  return {
    width: Math.abs(a!) * width + Math.abs(c!) * height,
    height: Math.abs(b!) * width + Math.abs(d!) * height,
  }
}

export async function readPdf(bytes: Uint8Array): Promise<PdfContent> {
  const document = await getDocument({ data: new Uint8Array(bytes), useSystemFonts: false, verbosity: 0 })
    .promise
  const pages: string[] = []
  const paths: { width: number; height: number }[] = []
  for (let number = 1; number <= document.numPages; number += 1) {
    const page = await document.getPage(number)
    const { items } = await page.getTextContent()
    pages.push(items.map((item) => ('str' in item ? item.str + (item.hasEOL ? ' ' : '') : '')).join(''))
    const { fnArray, argsArray } = await page.getOperatorList()
    const stack: Matrix[] = []
    let matrix = IDENTITY
    fnArray.forEach((operation, i) => {
      const args = argsArray[i] as unknown[]
      if (operation === OPS.save) stack.push(matrix)
      else if (operation === OPS.restore) matrix = stack.pop() ?? IDENTITY
      else if (operation === OPS.transform) matrix = product(matrix, args as number[])
      else if (operation === OPS.constructPath) {
        const box = args[2] as ArrayLike<number> | null
        if (box) paths.push(sizeUnder(matrix, box[2]! - box[0]!, box[3]! - box[1]!))
      }
    })
  }
  await document.destroy()
  return { pages, paths }
}
