/** A small seeded generator (mulberry32): the same seed gives the same run, so a failure repeats. */
export function seeded(seed: number) {
  let state = seed >>> 0;
  const fraction = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const below = (n: number): number => Math.floor(fraction() * n);
  return {
    fraction,
    below,
    pick: <T>(list: readonly T[]): T => list[below(list.length)] as T,
    chance: (p: number): boolean => fraction() < p,
    uuid: (): string => {
      const hex = Array.from({ length: 32 }, () => below(16).toString(16));
      hex[12] = '7';
      hex[16] = '8';
      return hex.join('').replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
    },
  };
}

export type Random = ReturnType<typeof seeded>;
