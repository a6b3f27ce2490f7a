import type { Working } from '../../main/contract/result'
import { formatSi } from '../../main/contract/units'
import { Formula } from '../text/formula'
import { readableNumbers, unbroken } from '../text/numbers'

/** How a number came about: formula, the same with its numbers, value, source. */
export function WorkingView({ working }: { working: Working }) {
  return (
    <div className="working">
      <p className="working-head">
        <strong>{working.title}</strong>
        <span className="figure">{formatSi(working.value, working.unit, 4)}</span>
      </p>
      <p className="figure working-formula"><Formula text={working.formula} /></p>
      {working.numbers !== working.formula && <p className="figure working-numbers"><Formula text={unbroken(readableNumbers(working.numbers))} /></p>}
      <p className="small muted">{working.source}</p>
    </div>
  )
}
