/** Turns the drawn figure into files. */
export interface FigureExporter {
  svg: () => string
  png: () => Promise<Blob>
}

/** Hands a file to the browser's download. */
export function download(file: Blob, name: string) {
  const address = URL.createObjectURL(file)
  const link = Object.assign(document.createElement('a'), { href: address, download: name })
  link.click()
  URL.revokeObjectURL(address)
}

/** The drawn figure as a document of its own, on paper. */
export function svgDocument(drawn: SVGSVGElement, paper: string): string {
  const copy = drawn.cloneNode(true) as SVGSVGElement
  copy.removeAttribute('style')
  copy.setAttribute('xmlns', 'http://www.w3.org/2000/svg')
  const ground = document.createElementNS('http://www.w3.org/2000/svg', 'rect')
  ground.setAttribute('width', '100%')
  ground.setAttribute('height', '100%')
  ground.setAttribute('fill', paper)
  copy.prepend(ground)
  return `<?xml version="1.0" encoding="UTF-8"?>\n${new XMLSerializer().serializeToString(copy)}\n`
}
