const carried = ['fill', 'stroke', 'stroke-width', 'stroke-dasharray', 'stroke-opacity', 'fill-opacity', 'opacity', 'font-family', 'font-size', 'font-weight', 'text-anchor']
const scale = 2

/** A copy of a chart that stands on its own: the styles that the page gives it are written into it. */
function standalone(svg: SVGSVGElement): { text: string; width: number; height: number } {
  const copy = svg.cloneNode(true) as SVGSVGElement
  const originals = [svg, ...svg.querySelectorAll('*')]
  const copies = [copy, ...copy.querySelectorAll('*')]
  originals.forEach((original, index) => {
    const style = getComputedStyle(original)
    for (const name of carried) copies[index].setAttribute(name, style.getPropertyValue(name))
    copies[index].removeAttribute('class')
  })
  const { width, height } = svg.getBoundingClientRect()
  copy.setAttribute('xmlns', 'http://www.w3.org/2000/svg')
  copy.setAttribute('width', String(width))
  copy.setAttribute('height', String(height))
  copy.style.background = getComputedStyle(document.body).backgroundColor
  return { text: new XMLSerializer().serializeToString(copy), width, height }
}

function base64Of(bytes: Uint8Array): string {
  return btoa(Array.from(bytes, (byte) => String.fromCharCode(byte)).join(''))
}

async function rasterOf(text: string, width: number, height: number): Promise<Uint8Array> {
  const image = new Image()
  image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(text)}`
  await image.decode()
  const canvas = document.createElement('canvas')
  canvas.width = Math.ceil(width * scale)
  canvas.height = Math.ceil(height * scale)
  const context = canvas.getContext('2d')
  if (context) {
    context.fillStyle = getComputedStyle(document.body).backgroundColor
    context.fillRect(0, 0, canvas.width, canvas.height)
    context.drawImage(image, 0, 0, canvas.width, canvas.height)
  }
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'))
  return new Uint8Array(await (blob ?? new Blob()).arrayBuffer())
}

/** The chart inside an element as a file, base64; null when there is none. */
export async function pictureOf(element: Element, kind: 'svg' | 'png'): Promise<string | null> {
  const svg = element.querySelector<SVGSVGElement>('svg')
  if (!svg) return null
  const { text, width, height } = standalone(svg)
  return base64Of(kind === 'svg' ? new TextEncoder().encode(text) : await rasterOf(text, width, height))
}
