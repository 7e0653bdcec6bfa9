/**
 * Random numbers that a seed decides: the same seed gives the same numbers on every machine.
 *
 * Method    SplitMix64's finaliser on 32 bits (a counter and a mixing function); good enough for a synthetic
 *           catalogue, not for secrets.
 * Source    Steele, Lea & Flood (2014), OOPSLA '14, 453–472; 32-bit constants of Hash Prospector (Wellons 2018),
 *           from memory, checked by the statistics of tests/models/unit/catalogue.test.ts.
 */
export class SeededRandom {
  private counter: number;

  constructor(seed: number) {
    this.counter = seed >>> 0;
  }

  /** Evenly spread in [0, 1). */
  next(): number {
    this.counter = (this.counter + 0x9e3779b9) >>> 0;
    let bits = this.counter;
    bits = Math.imul(bits ^ (bits >>> 16), 0x21f0aaad);
    bits = Math.imul(bits ^ (bits >>> 15), 0x735a2d97);
    return ((bits ^ (bits >>> 15)) >>> 0) / 2 ** 32;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.next();
  }

  /** Standard normal (Box & Muller 1958, Ann. Math. Stat. 29, 610–611). */
  normal(): number {
    return Math.sqrt(-2 * Math.log(1 - this.next())) * Math.cos(2 * Math.PI * this.next());
  }

  /** Poisson counts of a mean up to 500, by multiplying (Knuth, The Art of Computer Programming 2, §3.4.1). */
  poisson(mean: number): number {
    // e^(−mean) has to stay far from the smallest double.
    if (!(mean >= 0 && mean <= 500)) throw new RangeError(`mean ${mean} lies outside 0 to 500`);
    const least = Math.exp(-mean);
    let count = -1;
    let product = 1;
    do {
      product *= this.next();
      count++;
    } while (product > least);
    return count;
  }
}

/** A magnitude ≥ `least` with the frequency 10^(−b·M) (Gutenberg & Richter 1944, BSSA 34, 185–188). */
export function gutenbergRichterMagnitude(random: SeededRandom, least: number, bValue: number): number {
  if (!(bValue > 0)) throw new RangeError(`b-value ${bValue} is not above 0`);
  return least - Math.log10(1 - random.next()) / bValue;
}
