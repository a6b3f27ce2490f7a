import { z } from 'zod'
import type { Card } from './cards'
import type { Problem, Reply } from './errors'
import type { Plan } from './plan'
import type { Result, Working } from './result'
import type { Waves } from './waves'

/**
 * What crosses between window and main side. One entry a channel: its request schema and who has it.
 * `both`: desktop and loopback host. `desktop`: needs the operating system's own dialogs and files.
 */
const document = z.json()
const revision = z.int().min(0)
const text = z.string().max(5_000_000)

export const channels = {
  about: { hosts: 'both', request: z.strictObject({}) },
  'cards.list': { hosts: 'both', request: z.strictObject({}) },
  'demos.list': { hosts: 'both', request: z.strictObject({}) },
  'document.read': { hosts: 'both', request: z.strictObject({ text }) },
  'document.write': { hosts: 'both', request: z.strictObject({ document }) },
  /** `remedies: false` answers sooner: an infeasible plan comes without the remedies that take several plans to verify. */
  'plan.run': { hosts: 'both', request: z.strictObject({ document, revision, remedies: z.boolean().default(true) }) },
  'plan.workings': { hosts: 'both', request: z.strictObject({ document, index: z.int().min(1) }) },
  'waves.run': { hosts: 'both', request: z.strictObject({ document, index: z.int().min(1), overdrive_v: z.number().positive().max(20).nullable() }) },
  'sheet.make': { hosts: 'both', request: z.strictObject({ document, paper: z.enum(['A4', 'LETTER']), date: z.iso.date().nullable() }) },
  'files.open': { hosts: 'desktop', request: z.strictObject({ path: z.string().max(4096).nullable() }) },
  'files.save': { hosts: 'desktop', request: z.strictObject({ text, path: z.string().max(4096).nullable(), suggested_name: z.string().max(255) }) },
  'files.export': { hosts: 'desktop', request: z.strictObject({ base64: z.string().max(50_000_000), suggested_name: z.string().max(255) }) },
  'files.recent': { hosts: 'desktop', request: z.strictObject({}) },
  'recovery.keep': { hosts: 'desktop', request: z.strictObject({ text: text.nullable() }) },
  'recovery.read': { hosts: 'desktop', request: z.strictObject({}) },
  'window.dirty': { hosts: 'desktop', request: z.strictObject({ dirty: z.boolean(), title: z.string().max(400) }) },
} as const satisfies Record<string, { hosts: 'both' | 'desktop'; request: z.ZodType }>

export type ChannelName = keyof typeof channels
export type RequestOf<N extends ChannelName> = z.input<(typeof channels)[N]['request']>

export interface Replies {
  about: { name: string; version: string; caution: string; host: 'desktop' | 'loopback' }
  'cards.list': { cards: readonly Card[] }
  'demos.list': { demos: readonly { id: string; title: string; document: unknown }[] }
  'document.read': { plan: Plan; document: unknown; changes: readonly string[] }
  'document.write': { text: string }
  'plan.run': { result: Result; revision: number }
  'plan.workings': { workings: readonly Working[] }
  'waves.run': Waves
  'sheet.make': { base64: string; suggested_name: string }
  'files.open': { text: string; path: string; name: string } | null
  'files.save': { path: string; name: string } | null
  'files.export': { name: string } | null
  'files.recent': { paths: readonly string[] }
  'recovery.keep': Record<string, never>
  'recovery.read': { text: string | null }
  'window.dirty': Record<string, never>
}

/** The one call of the bridge: a value back, never a throw. */
export type Call = <N extends ChannelName>(name: N, request: RequestOf<N>) => Promise<Reply<Replies[N]>>
export type { Problem }
