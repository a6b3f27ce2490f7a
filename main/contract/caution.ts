/** What a reader has to know before any figure: first thing under the title of the sheet, and in About. */
export const cautionText = 'Planning estimates, not sign-off. Confirm with the foundry’s kit and full simulation. '
  + 'Where the converter is part of equipment that can hurt people, the applicable functional-safety and medical or automotive standards '
  + 'and a licensed engineer’s judgement come first.'
