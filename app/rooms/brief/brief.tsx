import { Button, Disclosure, DisclosurePanel, Heading } from 'react-aria-components'
import { Icon } from '../../parts/icon'
import { valueAt } from '../../state/paths'
import { useApp, useStore } from '../../state/use-store'
import { labelOf } from '../../text/labels'
import { Explain } from './explain'
import { Field } from './field'
import { isShown, sectionOf, sections, titleOf, type Section } from './sections'

/** The inputs of the plan. */
export function Brief() {
  return (
    <section className="brief" aria-labelledby="brief-title" data-room="brief">
      <div className="scroll brief-fields">
        <h2 id="brief-title" className="room-title">Brief</h2>
        <Elsewhere />
        {sections.map((section) => <FoldingSection key={section.id} section={section} />)}
      </div>
      <Explain />
    </section>
  )
}

function FoldingSection({ section }: { section: Section }) {
  const app = useApp()
  const folded = useStore(app.views, (state) => state.folded.includes(section.id))
  const document = useStore(app.documents, (state) => state.document)
  const shown = section.fields.filter((path) => isShown(path, document))
  const drafts = useStore(app.views, (state) => state.drafts)
  const problems = useStore(app.results, (state) => state.problems)
  const mistakes = shown.filter((path) => drafts[path] !== undefined || problems.some((one) => one.path === path || one.path.startsWith(`${path}.`))).length
  const set = shown.filter((path) => valueAt(document, path) !== undefined).length
  return (
    <Disclosure className="fold" isExpanded={!folded} onExpandedChange={(open) => app.views.fold(section.id, !open)}>
      <Heading level={3}>
        <Button slot="trigger" className="fold-button">
          <Icon shape={folded ? 'chevron' : 'down'} />
          <span>{titleOf(section, document)}</span>
          {mistakes > 0
            ? <span className="fold-note bad">{mistakes} to mend</span>
            : folded && <span className="fold-note">{set === 0 ? 'all default' : `${set} of ${shown.length} set`}</span>}
        </Button>
      </Heading>
      <DisclosurePanel className="fold-panel">{shown.map((path) => <Field key={path} path={path} />)}</DisclosurePanel>
    </Disclosure>
  )
}

/** Problems that have no field of their own here. */
function Elsewhere() {
  const app = useApp()
  const document = useStore(app.documents, (state) => state.document)
  const problems = useStore(app.results, (state) => state.problems)
  const homeless = problems.filter(({ path }) => sectionOf(path) === undefined || !isShown(path, document))
  if (homeless.length === 0) return null
  return (
    <ul className="homeless" aria-label="Problems without a field">
      {homeless.map((problem) => (
        <li key={problem.path + problem.code}>
          <strong>{labelOf(problem.path)}</strong> {problem.value === '' ? '' : `is ${problem.value}. `}{problem.hint}
        </li>
      ))}
    </ul>
  )
}
