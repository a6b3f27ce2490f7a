/** A drawn device: width and length [m], how many. */
export interface DrawnDevice { readonly width: number; readonly length: number; readonly count: number }

/** Layout area: factor·ΣW(L + diffusion pitch) [m²]; common practice. */
export const layoutArea = (devices: readonly DrawnDevice[], factor: number, pitch: number): number =>
  factor * devices.reduce((sum, d) => sum + d.count * d.width * (d.length + pitch), 0)

/** Sum of drawn widths [m]. */
export const totalWidth = (devices: readonly DrawnDevice[]): number => devices.reduce((sum, d) => sum + d.count * d.width, 0)
