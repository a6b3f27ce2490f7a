import type { z } from 'zod'
import { channels, type ChannelName, type Replies } from '../contract/channels'
import { fail, succeed, type Failure, type Reply } from '../contract/errors'
import { isSuperseded } from './superseded'

type Handler<N extends ChannelName, C> = (request: z.output<(typeof channels)[N]['request']>, context: C) => Promise<Reply<Replies[N]>>

/** What answers each of some channels. */
export type Table<N extends ChannelName, C> = { readonly [K in N]: Handler<K, C> }

/**
 * Makes the one door to a table of channels: holds the request against the channel's schema, and turns whatever happens into a reply.
 *
 * @param table   what answers each channel
 * @param report  is told of unexpected errors; the asker only gets a calm sentence
 */
export function answerFrom<N extends ChannelName, C>(table: Table<N, C>, report: (error: unknown) => void = console.error) {
  return async (name: string, request: unknown, context: C): Promise<Reply<unknown>> => {
    if (!Object.hasOwn(table, name)) return fail('unknown_channel', `This host has no channel ${name.slice(0, 80)}.`)
    const channel = name as N
    const read = readRequest(channel, request)
    if (!read.ok) return read
    try {
      return await table[channel](read.value as never, context)
    } catch (error) {
      if (isSuperseded(error)) return fail('cancelled', 'A newer request replaced this one.')
      report(error)
      return fail('compute_failed', 'The program could not finish this request. Your plan is unchanged; change a value or try again.')
    }
  }
}

function readRequest(channel: ChannelName, request: unknown): Reply<unknown> {
  try {
    const read = channels[channel].request.safeParse(request)
    return read.success ? succeed(read.data) : badRequest(channel, read.error.issues)
  } catch {
    return fail('bad_request', `${channel} cannot take this request. It is nested too deep.`)
  }
}

function badRequest(channel: ChannelName, issues: readonly z.core.$ZodIssue[]): Failure {
  const said = issues.slice(0, 5).map((issue) => `${issue.path.join('.') || 'request'}: ${issue.message}`)
  return fail('bad_request', `${channel} cannot take this request. ${said.join('; ')}`)
}
