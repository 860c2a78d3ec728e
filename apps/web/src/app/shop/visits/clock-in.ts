/** What the clock on the wall shows at an instant, for a time field: "08:30". */
export function clockIn(zone: string, instant: string): string {
  return new Intl.DateTimeFormat('en-GB', {
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
    timeZone: zone,
  }).format(new Date(instant));
}
