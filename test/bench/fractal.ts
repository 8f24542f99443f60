/** Numbers in [0, 1) that follow from the seed alone, on any machine (a 32-bit mixing generator, mulberry32). */
export function randomFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/**
 * Fractal ground by midpoint displacement on squares (Fournier, Fussell & Carpenter 1982), cut to `side × side`,
 * float32 metres. Displacements start at `reliefM` and shrink by `roughness` (0…1, high is rough) a halving; below
 * `finestStep` cells they are left out, so that the ground between is smooth.
 */
export function fractal(
  side: number,
  seed: number,
  reliefM: number,
  roughness: number,
  finestStep = 1,
): Float32Array {
  const random = randomFrom(seed);
  let span = 1;
  while (span + 1 < side) span *= 2;
  const n = span + 1;
  const z = new Float32Array(n * n);
  let amplitude = reliefM;
  const moved = (step: number): number => (step < finestStep ? 0 : (random() * 2 - 1) * amplitude);
  for (const corner of [0, span, span * n, span * n + span]) z[corner] = moved(span);
  for (let step = span; step > 1; step /= 2) {
    const half = step / 2;
    amplitude *= roughness;
    for (let row = half; row < n; row += step) {
      for (let column = half; column < n; column += step) {
        const at = row * n + column;
        const up = at - half * n;
        const down = at + half * n;
        z[at] = (z[up - half] + z[up + half] + z[down - half] + z[down + half]) / 4 + moved(half);
      }
    }
    for (let row = 0; row < n; row += half) {
      for (let column = row % step === 0 ? half : 0; column < n; column += step) {
        const at = row * n + column;
        // On the rim the missing fourth neighbour is the mirrored one.
        const up = row > 0 ? z[at - half * n] : z[at + half * n];
        const down = row < span ? z[at + half * n] : z[at - half * n];
        const left = column > 0 ? z[at - half] : z[at + half];
        const right = column < span ? z[at + half] : z[at - half];
        z[at] = (up + down + left + right) / 4 + moved(half);
      }
    }
  }
  const cut = new Float32Array(side * side);
  for (let row = 0; row < side; row++) cut.set(z.subarray(row * n, row * n + side), row * side);
  return cut;
}
