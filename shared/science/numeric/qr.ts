/**
 * Householder QR for the tall, thin matrices of a fit. Matrices are column-major: element (i, j) of an m-row matrix is
 * a[j * m + i]. Everything works in place so that the inner loops of a fit allocate nothing.
 *
 * @source Businger & Golub, Numerische Mathematik 7 (1965) 269
 */

/** Leaves R in the upper triangle of the m × n matrix `a` and Qᵀb in `b`; a column of zeros gives a zero on the diagonal. */
export function triangularize(a: Float64Array, m: number, n: number, b: Float64Array): void {
  const steps = Math.min(m, n)
  for (let k = 0; k < steps; k++) reflect(a, m, n, b, k)
}

function reflect(a: Float64Array, m: number, n: number, b: Float64Array, k: number): void {
  const top = k * m + k
  let square = 0
  for (let i = k; i < m; i++) square += a[k * m + i]! * a[k * m + i]!
  if (square === 0) return
  const norm = a[top]! > 0 ? -Math.sqrt(square) : Math.sqrt(square)
  const beta = 1 / (square - a[top]! * norm)
  a[top]! -= norm
  for (let j = k + 1; j < n; j++) {
    let dot = 0
    for (let i = k; i < m; i++) dot += a[k * m + i]! * a[j * m + i]!
    dot *= beta
    for (let i = k; i < m; i++) a[j * m + i]! -= dot * a[k * m + i]!
  }
  let dot = 0
  for (let i = k; i < m; i++) dot += a[k * m + i]! * b[i]!
  dot *= beta
  for (let i = k; i < m; i++) b[i]! -= dot * a[k * m + i]!
  a[top] = norm
  for (let i = k + 1; i < m; i++) a[k * m + i] = 0
}

/** Solves R·out = b for the upper triangle in `a` (m rows stored); `out` may be `b`. */
export function backSubstitute(a: Float64Array, m: number, n: number, b: Float64Array, out: Float64Array): void {
  for (let j = n - 1; j >= 0; j--) {
    let value = b[j]!
    for (let k = j + 1; k < n; k++) value -= a[k * m + j]! * out[k]!
    out[j] = value / a[j * m + j]!
  }
}

/** R⁻¹ as an n × n column-major matrix. */
export function invertTriangle(a: Float64Array, m: number, n: number): Float64Array {
  const inverse = new Float64Array(n * n)
  for (let j = 0; j < n; j++) {
    inverse[j * n + j] = 1 / a[j * m + j]!
    for (let i = j - 1; i >= 0; i--) {
      let value = 0
      for (let k = i + 1; k <= j; k++) value -= a[k * m + i]! * inverse[j * n + k]!
      inverse[j * n + i] = value / a[i * m + i]!
    }
  }
  return inverse
}

/** True when a diagonal element of R is negligible beside its column: the columns are linearly dependent. */
export function isDeficient(a: Float64Array, m: number, n: number, tolerance: number): boolean {
  for (let j = 0; j < n; j++) {
    let square = 0
    for (let i = 0; i <= j; i++) square += a[j * m + i]! * a[j * m + i]!
    if (!(Math.abs(a[j * m + j]!) > tolerance * Math.sqrt(square))) return true
  }
  return false
}

/**
 * Largest and smallest singular value of R with its columns scaled to unit length, by one-sided Jacobi rotations.
 *
 * @source Demmel & Veselić, SIAM Journal on Matrix Analysis and Applications 13 (1992) 1204
 */
export function scaledSingularValues(a: Float64Array, m: number, n: number): { largest: number, smallest: number } {
  const u = unitColumns(a, m, n)
  for (let sweep = 0; sweep < 30; sweep++) {
    if (!rotateAll(u, n)) break
  }
  let largest = 0
  let smallest = Infinity
  for (let j = 0; j < n; j++) {
    const norm = Math.sqrt(columnDot(u, n, j, j))
    largest = Math.max(largest, norm)
    smallest = Math.min(smallest, norm)
  }
  return { largest, smallest }
}

function unitColumns(a: Float64Array, m: number, n: number): Float64Array {
  const u = new Float64Array(n * n)
  for (let j = 0; j < n; j++) {
    let square = 0
    for (let i = 0; i <= j; i++) square += a[j * m + i]! * a[j * m + i]!
    const scale = square > 0 ? 1 / Math.sqrt(square) : 0
    for (let i = 0; i <= j; i++) u[j * n + i] = a[j * m + i]! * scale
  }
  return u
}

function columnDot(u: Float64Array, n: number, p: number, q: number): number {
  let dot = 0
  for (let i = 0; i < n; i++) dot += u[p * n + i]! * u[q * n + i]!
  return dot
}

function rotateAll(u: Float64Array, n: number): boolean {
  let rotated = false
  for (let p = 0; p < n - 1; p++) {
    for (let q = p + 1; q < n; q++) {
      const alpha = columnDot(u, n, p, p)
      const beta = columnDot(u, n, q, q)
      const gamma = columnDot(u, n, p, q)
      if (Math.abs(gamma) <= 1e-15 * Math.sqrt(alpha * beta)) continue
      rotated = true
      rotate(u, n, p, q, (beta - alpha) / (2 * gamma))
    }
  }
  return rotated
}

function rotate(u: Float64Array, n: number, p: number, q: number, zeta: number): void {
  const tangent = (zeta >= 0 ? 1 : -1) / (Math.abs(zeta) + Math.sqrt(1 + zeta * zeta))
  const cosine = 1 / Math.sqrt(1 + tangent * tangent)
  const sine = cosine * tangent
  for (let i = 0; i < n; i++) {
    const left = u[p * n + i]!
    const right = u[q * n + i]!
    u[p * n + i] = cosine * left - sine * right
    u[q * n + i] = sine * left + cosine * right
  }
}
