import { describe, expect, it } from 'vitest'
import { ScienceError } from '#shared/science/errors'
import type { FitRequest, Point } from '#shared/science/fitting'
import { fit } from '#shared/science/fitting'
import { fitExpression } from '#shared/science/fitting/expression'

const ladder: Point[] = [0, 0.1, 0.2, 0.4, 0.6, 0.8, 1, 1.2].map(x => ({ x, y: 31 - 4 * x + 12 * x / (1 + 4 * x) + 0.02 * Math.sin(40 * x) }))
const binding = 'T0 + c*x + Bmax*K*x/(1+K*x)'
const starts = { T0: { start: 30 }, c: { start: -1 }, Bmax: { start: 1 }, K: { start: 1 } }

function request(expression: string, parameters: object = { a: { start: 1 }, b: { start: 1 } }, changes: Partial<FitRequest> = {}): FitRequest {
  return { model: { expression, variable: 'x', parameters: parameters as typeof starts }, points: ladder, ...changes }
}

function problemsOf(given: FitRequest): { path: string, message: string }[] {
  try {
    fitExpression(given)
    return []
  }
  catch (error) {
    if (!(error instanceof ScienceError)) throw error
    return [...error.problems]
  }
}

const messagesOf = (expression: string) => problemsOf(request(expression)).map(({ message }) => message).join(' ')

describe('fitExpression', () => {
  it('gives the constants of the named model it spells out', () => {
    const typed = fitExpression(request(binding, starts))
    const named = fit({ model: 'linear-langmuir', points: ladder })
    named.parameters.forEach(({ estimate, standardError, interval }, j) => {
      const other = typed.parameters[j]!
      expect(other.estimate!).toBeCloseTo(estimate!, 9)
      expect(other.standardError!).toBeCloseTo(standardError!, 9)
      expect(other.interval!.lower!).toBeCloseTo(interval!.lower!, 6)
      expect(other.interval!.upper!).toBeCloseTo(interval!.upper!, 6)
    })
    expect(typed.model).toBe('expression')
  })

  it('holds a parameter that is fixed', () => {
    const result = fitExpression(request(binding, { ...starts, K: { start: 4, fixed: 4 } }))
    expect(result.parameters[3]).toMatchObject({ estimate: 4, fixed: true, standardError: null })
    expect(result.covariance).toHaveLength(3)
  })

  it('finds the better of two valleys when bounds say where to look', () => {
    const wave = ladder.map(({ x }) => ({ x, y: Math.sin(9 * x) }))
    const model = { w: { start: 2, min: 0, max: 12 } }
    expect(fitExpression(request('sin(w*x)', model, { points: wave })).parameters[0]!.estimate).toBeCloseTo(9, 6)
  })

  it('reports a parameter that ends at its bound', () => {
    const result = fitExpression(request(binding, { ...starts, K: { start: 1, max: 2 } }))
    expect(result.stopReason).toBe('bound')
    expect(result.parameters[3]).toMatchObject({ estimate: 2, standardError: null })
    expect(result.notes.find(({ code }) => code === 'parameter-at-bound')?.values).toMatchObject({ parameter: 'K', side: 'upper', bound: 2 })
  })

  it('knows every listed function with its derivative', () => {
    for (const name of ['exp', 'log', 'ln', 'log10', 'log2', 'sqrt', 'cbrt', 'sin', 'cos', 'tan', 'asin', 'acos', 'atan', 'sinh', 'cosh', 'tanh']) {
      const inner = 0.3
      const f = (a: number) => fitExpression(request(`${name}(${inner}*a) + b*x`, { a: { start: 1, fixed: a }, b: { start: 1 } }, { points: [{ x: 0, y: 0 }, { x: 1, y: 1 }, { x: 2, y: 3 }] })).residuals[0]!.fitted
      const points = [0.9, 1, 1.1, 1.2].map((a, x) => ({ x, y: f(a) }))
      expect(fitExpression(request(`${name}(${inner}*(a + b*x))`, { a: { start: 0.8 }, b: { start: 0.15 } }, { points })).parameters[0]!.estimate).toBeCloseTo(0.9, 8)
    }
  })

  it('takes x^b at x = 0', () => {
    const points = [0, 0.5, 1, 2].map(x => ({ x, y: 3 * x ** 1.5 }))
    expect(fitExpression(request('a*x^b', undefined, { points })).parameters.map(({ estimate }) => Number(estimate!.toFixed(8)))).toEqual([3, 1.5])
  })
})

describe('fitExpression, given an expression that is not plain arithmetic', () => {
  it.each([
    ['an assignment', 'a = 3; a*x + b', 'several statements'],
    ['a single assignment', 'y = a*x + b', 'an assignment'],
    ['a function definition', 'f(x) = a*x + b', 'a function definition'],
    ['a loop by recursion', 'f(n) = n <= 1 ? 1 : f(n-1) + a*b*x', 'a function definition'],
    ['a condition', 'x > 1 ? a : b', 'a condition'],
    ['a comparison', 'a*x < b < 3', 'a comparison'],
    ['a property', 'a.constructor + b*x', 'access to a property'],
    ['a reach for the prototype', 'x.constructor("return process") + a*x + b', 'calls a property'],
    ['a reach by index', 'a["__proto__"] + b*x', 'access to a property'],
    ['a list', '[a, b]*x', 'a list'],
    ['an object', '{ a: 1 }.a + a*b*x', 'access to a property'],
    ['a range', 'a:b', 'a range'],
    ['a text', '"a" + a*b*x', 'not a finite number'],
    ['a call of import', 'import({a: 1}) + a*x + b', 'calls import'],
    ['a call of evaluate', 'evaluate("1") + a*x + b', 'calls evaluate'],
    ['a factorial', 'a*x! + b', 'the operator !'],
    ['an unknown name', 'a*z + b', 'contains z'],
    ['the imaginary unit', 'a*x + b*i', 'contains i'],
    ['two arguments for one', 'exp(a, b)*x', 'takes one argument'],
    ['nothing readable', 'a*(x + b', 'cannot be read'],
    ['nothing at all', '', 'contains'],
  ])('refuses %s', (_, expression, message) => {
    expect(messagesOf(expression)).toContain(message)
  })

  it('refuses depth, size and length beyond its limits', () => {
    expect(messagesOf(`${'('.repeat(60)}a*x + b${')'.repeat(60)}`)).toContain('levels deep')
    expect(messagesOf(`a*x + b${'+1'.repeat(240)}`)).toMatch(/levels deep|parts/)
    expect(messagesOf(`a*x + b${' '.repeat(600)}`)).toContain('characters')
  })

  it('refuses parameters that change nothing', () => {
    expect(messagesOf('a*x')).toContain('does not contain the parameter b')
    expect(messagesOf('a*x + 0*b')).toContain('does not depend on the parameter b')
    expect(messagesOf('a*x + b - b')).toContain('does not depend on the parameter b')
  })

  it('refuses names that mean something else', () => {
    const paths = problemsOf(request('pi*x + exp*x', { pi: { start: 1 }, exp: { start: 1 }, x: { start: 2 }, __proto: { start: 1 } })).map(({ path }) => path)
    expect(paths).toEqual(expect.arrayContaining(['model.parameters.pi', 'model.parameters.exp', 'model.parameters.x', 'model.parameters.__proto']))
  })

  it('asks for a start at which the expression has a value', () => {
    expect(messagesOf('log(a*x) + b')).toContain('not a finite number for point 1')
  })

  it('names every problem at once', () => {
    const problems = problemsOf(request('a*z + q(x)', undefined, { points: [{ x: NaN, y: 31 }, ...ladder] }))
    expect(problems.map(({ path }) => path)).toEqual(['points.0.x', 'model.expression', 'model.expression'])
  })
})

describe('fitExpression, given work without end', () => {
  it('gives the best point it reached when its operations run out in the middle of a descent', () => {
    const points = Array.from({ length: 5_000 }, (_, i) => ({ x: i / 5_000, y: Math.sin(i) }))
    const expression = `a*${'sin('.repeat(20)}b*x${')'.repeat(20)}`
    const bounded = { a: { start: 1, min: -9, max: 9 }, b: { start: 1, min: -900, max: 900 } }
    const result = fitExpression({ model: { expression, variable: 'x', parameters: bounded }, points })
    expect(result.stopReason).toBe('limit')
    expect(result.residualSumOfSquares).toBeLessThan(points.reduce((sum, { x, y }) => sum + (y - Math.sin(x)) ** 2, 0))
    expect(result.notes.map(({ code }) => code)).toContain('not-converged')
    expect(result.notes.map(({ code }) => code)).not.toContain('parameter-at-bound')
  })

  it('stops at its limit and says so, in bounded time', () => {
    const points = Array.from({ length: 5_000 }, (_, i) => ({ x: i / 5_000, y: Math.sin(i * i) }))
    const names = ['a', 'b', 'c', 'd', 'f', 'g', 'h', 'k']
    const expression = names.map((name, j) => `${name}*sin(exp(${name}*x*${j + 1})*x)`).join('+')
    const parameters = Object.fromEntries(names.map(name => [name, { start: 1, min: -50, max: 50 }]))
    const result = fitExpression(request(expression, parameters, { points }))
    expect(result.stopReason).toBe('limit')
    expect(result.converged).toBe(false)
    expect(result.notes.map(({ code }) => code)).toContain('not-converged')
  })
})
