/** 1 is Monday, 7 Sunday (ISO 8601). */
export function isoWeekday(day: string): number {
  return new Date(`${day}T00:00:00Z`).getUTCDay() || 7;
}
