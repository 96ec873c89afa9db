/** A repeatable source of random numbers for simulations that check a formula (sfc32 of PractRand, seeded by one number). */
export class SeededRandom {
  private a = 0x9e3779b9;
  private b = 0x243f6a88;
  private c = 0xb7e15162;
  private counter = 1;
  private spare: number | undefined;

  constructor(seed: number) {
    this.a ^= seed;
    for (let i = 0; i < 20; i++) this.bits();
  }

  /** 32 random bits. */
  bits(): number {
    const sum = (((this.a + this.b) | 0) + this.counter) | 0;
    this.counter = (this.counter + 1) | 0;
    this.a = this.b ^ (this.b >>> 9);
    this.b = (this.c + (this.c << 3)) | 0;
    this.c = (((this.c << 21) | (this.c >>> 11)) + sum) | 0;
    return sum >>> 0;
  }

  /** Uniform above 0 and below 1. */
  uniform(): number {
    return (this.bits() + 0.5) / 2 ** 32;
  }

  /** 1 or -1. */
  sign(): number {
    return this.bits() & 0x10000 ? 1 : -1;
  }

  /** Standard normal (Box and Muller 1958). */
  normal(): number {
    if (this.spare !== undefined) {
      const value = this.spare;
      this.spare = undefined;
      return value;
    }
    const radius = Math.sqrt(-2 * Math.log(this.uniform()));
    const angle = 2 * Math.PI * this.uniform();
    this.spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  }
}
