import { createHash } from 'node:crypto'

/** The one style element that the accessible controls add while running; anything else inline is refused. */
export const pressStyle = '@layer {\n  [data-react-aria-pressable] {\n    touch-action: pan-x pan-y pinch-zoom;\n  }\n}'

const pressStyleHash = `'sha256-${createHash('sha256').update(pressStyle).digest('base64')}'`

/** What the window may load: its own files and nothing else. The same in the desktop program and in the browser host. */
export const contentPolicy = [
  "default-src 'none'",
  "script-src 'self'",
  `style-src 'self' ${pressStyleHash}`,
  "img-src 'self' data: blob:",
  "font-src 'self'",
  "connect-src 'self'",
  "form-action 'none'",
  "base-uri 'none'",
  "frame-ancestors 'none'",
].join('; ')

/** Headers of every answer a host gives. */
export const securityHeaders: Readonly<Record<string, string>> = {
  'content-security-policy': contentPolicy,
  'x-content-type-options': 'nosniff',
  'x-frame-options': 'DENY',
  'referrer-policy': 'no-referrer',
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'permissions-policy': 'camera=(), microphone=(), geolocation=(), payment=(), usb=()',
}
