/** The bays from the first to the last; none when that is no range. */
export function baysBetween(from: number | null | undefined, until: number | null | undefined) {
  if (!from || !until || until < from || from < 1 || until > 999) return [];
  return Array.from({ length: until - from + 1 }, (_, i) => from + i);
}

/** Serial numbers written one a line, in the order of the bays; an empty line leaves a bay without. */
export function serialsByBay(lines: string, bays: readonly number[]): ReadonlyMap<number, string> {
  const serials = lines.split('\n').map((line) => line.trim());
  return new Map(
    bays.flatMap((bay, i) => {
      const serial = serials[i];
      return serial ? [[bay, serial] as const] : [];
    }),
  );
}
