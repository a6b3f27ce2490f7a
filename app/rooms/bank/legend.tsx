import { tintStarts } from './palette'

/** What the signs of a cell mean. */
export function Legend() {
  return (
    <ul className="legend small muted" aria-label="What a cell shows">
      {(['time', 'noise', 'offset'] as const).map((name) => (
        <li key={name}><span className="swatch" data-name={name} />{name}</li>
      ))}
      <li>
        <svg width="18" height="8" aria-hidden="true"><path d="M0 4.5h18" stroke="var(--ink)" strokeDasharray="2 2" /></svg>limit
      </li>
      <li>
        <svg width="16" height="13" viewBox="0 0 16 13" aria-hidden="true">
          <path d="M1 1h9l5 5v6H1z" fill="none" stroke="var(--over)" strokeWidth="1.5" />
          <path d="M12 0h4v4z" fill="var(--over)" />
        </svg>over it
      </li>
      <li className="ramp">
        <span>tightest<span className="roomy"> use</span></span>
        <span className="ramp-steps" role="img" aria-label={`Six tints for the tightest use, from under ${tintStarts[1] * 100} % to 100 % of the limit`}>
          {tintStarts.map((start, index) => <span key={start} style={{ background: `var(--tint-${index + 1})` }} />)}
        </span>
        <span><span className="figure">50 to 100 %</span><span className="roomy"> of the limit</span></span>
      </li>
    </ul>
  )
}
