/** The trade day some days on. Written out here, because a whole calendar weighs too much on a phone. */
export function daysOn(day: string, days: number): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + days * 86_400_000).toISOString().slice(0, 10);
}
