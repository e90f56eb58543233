/** A small seeded generator of uniform numbers in [0, 1), so that simulations in tests repeat (mulberry32). */
export function seededRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** Mean of samples and its standard error. */
export function meanOf(samples: readonly number[]): { mean: number; standardError: number } {
  const mean = samples.reduce((sum, sample) => sum + sample, 0) / samples.length;
  const squares = samples.reduce((sum, sample) => sum + (sample - mean) ** 2, 0);
  return { mean, standardError: Math.sqrt(squares / (samples.length - 1) / samples.length) };
}
