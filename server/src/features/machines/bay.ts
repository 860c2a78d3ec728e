/** The place as people say it: bank B, seventh is B-07. */
export function bayName(letter: string, bayNumber: number): string {
  return `${letter}-${String(bayNumber).padStart(2, '0')}`;
}
