import { describe, expect, it } from 'vitest'
import { gaussLegendre } from '../../main/planner/numerics/quadrature'
import {
  erf, erfc, erfcx, logNormalInterval, logNormalTail, normalCdf, normalCdfInverse, normalExcess, normalInterval, normalTail, normalTailInverse,
} from '../../main/planner/numerics/statistics'
import { expectHighPrecision } from './tolerance'
import published from './yield-statistics.json'

const functions = { erf, erfc, erfcx, normalCdf, normalTail, logNormalTail, normalExcess, normalTailInverse }

describe('normal distribution against 60-digit arithmetic', () => {
  for (const [name, f] of Object.entries(functions)) {
    it(name, () => {
      const table = Object.entries(published[name as keyof typeof functions] as Record<string, string>)
      expect(table.length).toBeGreaterThan(5)
      for (const [x, value] of table) expectHighPrecision(f(Number(x)), value, `${name}(${x})`)
    })
  }

  it('erf and erfc to a few units of the last place', () => {
    for (const [x, value] of Object.entries(published.erf)) expect(Math.abs(erf(Number(x)) / Number(value) - 1)).toBeLessThan(1e-15)
    for (const [x, value] of Object.entries(published.erfc)) expect(Math.abs(erfc(Number(x)) / Number(value) - 1)).toBeLessThan(1e-15)
  })

  it('normalCdfInverse on both sides', () => {
    for (const [q, value] of Object.entries(published.normalTailInverse)) {
      expectHighPrecision(normalCdfInverse(Number(q)), -Number(value), `Φ⁻¹(${q})`)
    }
    expectHighPrecision(normalCdfInverse(0.75), published.normalTailInverse['0.25'], 'Φ⁻¹(0.75)')
    expectHighPrecision(normalTailInverse(0.625), -Number(published.normalTailInverse['0.375']), 'Q⁻¹(0.625)')
  })

  it('interval probabilities, near, far and narrow', () => {
    for (const { from, to, value, log } of published.normalInterval) {
      expectHighPrecision(normalInterval(from, to), value, `Φ(${to}) − Φ(${from})`)
      expectHighPrecision(normalInterval(-to, -from), value, `Φ(${-from}) − Φ(${-to})`)
      expectHighPrecision(logNormalInterval(from, to), log, `ln(Φ(${to}) − Φ(${from}))`)
    }
    for (const { from, to, log } of published.logNormalIntervalFar) expectHighPrecision(logNormalInterval(from, to), log, `ln, ${from} to ${to}`)
  })

  it('outermost Gauss–Legendre node and weight', () => {
    for (const order of ['3', '5'] as const) {
      const { nodes, weights } = gaussLegendre(Number(order))
      const [node, weight] = published.gaussLegendre[order]
      expectHighPrecision(nodes[nodes.length - 1], node)
      expectHighPrecision(weights[weights.length - 1], weight)
    }
  })
})
