/** A reproducible stream of random numbers: the same seed gives the same draws on every machine. */
export interface RandomStream {
  /** Uniform in [−√3, √3]: the rectangular distribution of unit variance. */
  rectangular(): number;
  /** Standard normal. */
  normal(): number;
}

const ROOT_3 = Math.sqrt(3);

/** Small fast counting generator sfc32 (Doty-Humphrey), seeded by a hash's hex digits and a number. */
export function randomStream(hexSeed: string, stream: number): RandomStream {
  const word = (index: number) =>
    Number.parseInt(hexSeed.slice(8 * index, 8 * index + 8).padEnd(8, "0"), 16) | 0;
  let a = word(0);
  let b = word(1);
  let c = word(2) ^ stream;
  let counter = 1;
  const next = (): number => {
    const sum = (((a + b) | 0) + counter) | 0;
    counter = (counter + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (c << 21) | (c >>> 11);
    c = (c + sum) | 0;
    return (sum >>> 0) / 4294967296;
  };
  for (let i = 0; i < 15; i++) next();
  return {
    rectangular: () => (2 * next() - 1) * ROOT_3,
    normal: () => {
      const radius = Math.sqrt(-2 * Math.log(1 - next()));
      return radius * Math.cos(2 * Math.PI * next());
    },
  };
}
