/** The month so many months later: `2031-12` and 1 is `2032-01`. */
export function monthsLater(month: string, by: number): string {
  const [year = 0, number = 1] = month.split('-').map(Number);
  return new Date(Date.UTC(year, number - 1 + by, 1)).toISOString().slice(0, 7);
}
