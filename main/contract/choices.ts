/** Every choice of the brief, its options as a person reads them, and those still to come. */
export interface Choice {
  readonly label: string
  readonly help: string
  readonly options: Readonly<Record<string, string>>
  /** Options that are part of the document but whose physics is not built yet. */
  readonly later?: readonly string[]
}

export const choices = {
  'converter.architecture': { label: 'Architecture', help: 'How the converter uses its comparators.',
    options: { flash: 'Flash', sar: 'SAR' } },
  'converter.inl_method': { label: 'INL method', help: 'IEEE 1241 terms: the straight line that INL is measured against.',
    options: { terminal: 'Terminal', best_fit: 'Best fit', absolute: 'Absolute' }, later: ['best_fit'] },
  'converter.flash.input_style': { label: 'Input style', help: 'Whether the common mode stays put or follows the tap.',
    options: { differential: 'Differential', single_ended: 'Single-ended' }, later: ['single_ended'] },
  'converter.flash.encoder': { label: 'Encoder', help: 'Turns the thermometer code into binary.',
    options: { ones_counter: 'Ones counter' } },
  'converter.sar.timing': { label: 'Timing', help: 'Whether a clock or the decisions themselves pace the search.',
    options: { synchronous: 'Synchronous', self_timed: 'Self-timed' } },
  'converter.sar.comparators': { label: 'Comparators', help: 'One comparator for all cycles, or one for each.',
    options: { one: 'One', one_per_bit: 'One per bit' } },
  'converter.sar.dac_scheme': { label: 'DAC scheme', help: 'How the capacitor array is switched; sets its size and energy.',
    options: { conventional: 'Conventional', split_capacitor: 'Split capacitor', monotonic: 'Monotonic', common_mode_based: 'Common-mode based' } },
  'comparator.topology': { label: 'Topology', help: 'The circuit of the latch.',
    options: { strong_arm: 'Strong-arm', double_tail: 'Double tail' } },
  'comparator.sizing': { label: 'Sizing', help: 'Let the planner find the widths, or evaluate yours as they stand.',
    options: { auto: 'Automatic', manual: 'Manual' } },
  'comparator.objective': { label: 'Objective', help: 'What automatic sizing makes small.',
    options: { energy: 'Energy', area: 'Area' } },
  'comparator.offset_method': { label: 'Offset plan', help: 'How the offset is brought under its limit.',
    options: { size: 'Size', trim: 'Trim', autozero: 'Autozero' } },
} as const satisfies Record<string, Choice>

export type ChoicePath = keyof typeof choices

export const cornerNames = ['typical', 'slow', 'fast'] as const
export type CornerName = (typeof cornerNames)[number]

/** Values of other fields whose physics is not built yet, beside the options marked `later`; none at present. */
export const laterValues: readonly { path: string; later: (value: unknown, plan: unknown) => boolean; allowed: string; hint: string }[] = []

/** Ledger items in the order in which they are shown; an override names one of these. */
export const ledgerItems = {
  'power.comparators': 'Comparators', 'power.capture': 'Capture latches', 'power.encoder': 'Encoder', 'power.clock': 'Clock',
  'power.ladder': 'Ladder', 'power.leakage': 'Leakage', 'power.input_driver': 'Input driver', 'power.sar_logic': 'SAR logic', 'power.dac': 'DAC',
  'area.comparators': 'Comparators', 'area.trim': 'Trim', 'area.capture': 'Capture latches', 'area.encoder': 'Encoder', 'area.clock': 'Clock',
  'area.ladder': 'Ladder', 'area.sampler': 'Sampler', 'area.sar_logic': 'SAR logic', 'area.dac': 'DAC',
} as const
export type LedgerItem = keyof typeof ledgerItems

/** The three limits each comparator is drawn with, and the other three it is held against. */
export const limitNames = { time: 'Decision', noise: 'Noise', offset: 'Offset', kickback: 'Kickback', memory: 'Memory', input: 'Input load' } as const
export type LimitName = keyof typeof limitNames
