/**
 * Two letters for a person on the day sheet; more where another of the shop has the same, for two
 * people with one mark would be sent to each other's visits.
 */
export function initialsFor(name: string, taken: readonly string[] = []): string {
  const parts = name
    .normalize('NFC')
    .split(/\s+/)
    .map((part) => [...part].filter((letter) => /\p{L}/u.test(letter)))
    .filter((letters) => letters.length > 0);
  const first = parts[0]?.[0] ?? '?';
  const last = parts.length > 1 ? (parts.at(-1) ?? []) : (parts[0] ?? []).slice(1);
  const shortest = (first + (last[0] ?? '')).toUpperCase();
  const longer = shortest + (last[1] ?? '').toLowerCase();
  const marks = [
    shortest,
    longer,
    ...Array.from({ length: 98 }, (_, at) => `${shortest}${at + 2}`),
  ];
  return marks.find((mark) => !taken.includes(mark)) ?? shortest;
}
