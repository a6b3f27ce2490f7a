import { limitNames, type LimitName } from '../../../main/contract/choices'
import type { ComparatorEntry, Limits, Reached, Result } from '../../../main/contract/result'
import { formatSi } from '../../../main/contract/units'
import { cannotBeMet, drawnUse, missesLimit } from '../../state/selection'
import { limitPhrase, lowered, percent, reachedOfLimit } from '../../text/labels'

/** What a comparator is called. */
export function nameOf(entry: ComparatorEntry, lanes: number): string {
  if (entry.cycle !== null) return lanes > 1 ? `Lane ${entry.lane + 1}, cycle ${entry.cycle}` : `Cycle ${entry.cycle}`
  return lanes > 1 ? `Comparator ${entry.index}, lane ${entry.lane + 1}` : `Comparator ${entry.index}`
}

/** One line on the tightest limit of a comparator. */
export function tightestText(entry: ComparatorEntry): string {
  if (entry.tightest === null) return 'could not be evaluated'
  const use = entry.use[entry.tightest]
  if (cannotBeMet(entry, entry.tightest)) return entry.tightest === 'time' ? 'no window to decide in' : `nothing can meet its ${limitPhrase(entry.tightest)}`
  if (use === null) return 'could not be evaluated'
  return `tightest at ${percent(use)} of its ${limitPhrase(entry.tightest)}`
}

function useText(entry: ComparatorEntry, name: LimitName): string {
  if (cannotBeMet(entry, name)) return 'against a limit that nothing can meet'
  return entry.use[name] === null ? 'not known' : `${percent(entry.use[name])} of its limit`
}

/** All that a cell shows, in words. */
export function describeCell(entry: ComparatorEntry, lanes: number): string {
  const uses = (Object.keys(limitNames) as LimitName[]).slice(0, 3)
    .map((name) => `${lowered(limitNames[name])} ${useText(entry, name)}`)
  const at = entry.threshold_v === null ? '' : `, threshold ${formatSi(entry.threshold_v, 'V')}`
  const over = missesLimit(entry) ? ', over the limit' : ''
  return `${nameOf(entry, lanes)}${at}: ${uses.join(', ')}; ${tightestText(entry)}${over}`
}

/** The heading of the bank. */
export function bankTitle(result: Result): string {
  const { architecture, lanes } = result.plan.converter
  const count = result.comparators.length
  if (architecture === 'flash') return `${count} comparators along the ladder${lanes > 1 ? `, ${lanes} lanes` : ''}`
  const physical = result.quantities.comparator_count
  const each = `${count / lanes} cycles${lanes > 1 ? ` in each of ${lanes} lanes` : ''}`
  return `${physical === 1 ? 'one comparator' : `${physical} comparators`}, ${each}`
}

/** A limit and what is reached of it: "Decision", "188 of 233 ps". */
export interface UseRow {
  readonly name: LimitName
  readonly label: string
  readonly text: string
  readonly use: number | null
  /** The use as it is drawn. */
  readonly drawn: number | null
  readonly limited: boolean
  /** Ids of the workings behind it. */
  readonly workings: readonly string[]
}

export function useRows(entry: ComparatorEntry, offsetMethod: string): UseRow[] {
  const { limits, reached, use } = entry
  const trimmed = offsetMethod === 'trim'
  const row = (name: LimitName, label: string, got: keyof Reached, limit: keyof Limits, unit: string, more: readonly string[] = []): UseRow => ({
    name, label, use: use[name], drawn: drawnUse(entry, name), limited: limits[limit] !== null,
    text: reachedOfLimit(reached[got], limits[limit], unit),
    workings: [`limits.${limit}`, ...more, `reached.${got}`],
  })
  return [
    row('time', limitNames.time, 'delay_s', 'window_s', 's', ['limits.overdrive_v', 'reached.integration_s', 'reached.tau_s']),
    row('noise', limitNames.noise, 'noise_v', 'noise_v', 'V'),
    trimmed
      ? row('offset', 'Trim step', 'trim_step_v', 'trim_step_v', 'V', ['reached.offset_v'])
      : row('offset', offsetMethod === 'autozero' ? 'Offset after autozero' : limitNames.offset, 'residual_v', 'offset_v', 'V', ['reached.offset_v']),
    row('kickback', limitNames.kickback, 'kickback_v', 'kickback_v', 'V'),
    row('memory', limitNames.memory, 'memory_v', 'memory_v', 'V'),
    row('input', limitNames.input, 'input_cap_f', 'input_cap_f', 'F'),
  ]
}
