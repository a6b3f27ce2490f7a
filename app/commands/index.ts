import type { Command } from './command'
import { applyRemedy } from './apply-remedy'
import { choosePaper } from './choose-paper'
import { clearValue } from './clear-value'
import { dropOverride } from './drop-override'
import { exportSheet } from './export-sheet'
import { goToField } from './go-to-field'
import { nextRoom, previousRoom } from './move-room'
import { newFromDemo } from './new-from-demo'
import { openPlan } from './open-plan'
import { openRecent } from './open-recent'
import { openText } from './open-text'
import { redo } from './redo'
import { restoreRecovery } from './restore-recovery'
import { savePlan } from './save-plan'
import { savePlanAs } from './save-plan-as'
import { selectComparator } from './select-comparator'
import { setCorners } from './set-corners'
import { setOverride } from './set-override'
import { setSizing } from './set-sizing'
import { setValue } from './set-value'
import { showAbout } from './show-about'
import { showShortcuts } from './show-shortcuts'
import { showSide } from './show-side'
import { showTab } from './show-tab'
import { undo } from './undo'
import { zoomBank } from './zoom-bank'

/** Commands that need no argument and have keys of their own, in the order the shortcuts are listed. */
export const shortcutCommands: readonly Command[] = [
  openPlan, savePlan, savePlanAs, undo, redo, exportSheet, nextRoom, previousRoom, showShortcuts,
]

/** Every command there is. */
export const allCommands: readonly Pick<Command<never>, 'id' | 'label' | 'shortcut'>[] = [
  ...shortcutCommands, applyRemedy, choosePaper, clearValue, dropOverride, goToField, newFromDemo, openRecent, openText,
  restoreRecovery, selectComparator, setCorners, setOverride, setSizing, setValue, showAbout, showSide, showTab, zoomBank,
]
