const formats = new Map<string, Intl.DateTimeFormat>();

function format(locale: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = locale + JSON.stringify(options);
  let found = formats.get(key);
  if (!found) {
    found = new Intl.DateTimeFormat(locale, options);
    formats.set(key, found);
  }
  return found;
}

/** "9:00 AM" where the day has two halves, "09:00" where it has one. */
function hourOf(locale: string): 'numeric' | '2-digit' {
  return format(locale, { hour: 'numeric' }).resolvedOptions().hour12 ? 'numeric' : '2-digit';
}

/** A trade day, `2031-05-06`: "Tue, May 6, 2031". It has no zone: it is the shop's own day. */
export function dayText(day: string, locale: string): string {
  return format(locale, {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    timeZone: 'UTC',
  }).format(new Date(`${day}T00:00:00Z`));
}

/** A month, `2031-05`: "May 2031". */
export function monthText(month: string, locale: string): string {
  return format(locale, { month: 'long', year: 'numeric', timeZone: 'UTC' }).format(
    new Date(`${month}-01T00:00:00Z`),
  );
}

/** An instant as the shop's clock shows it: "May 6, 2031, 10:30". */
export function instantText(instant: string, locale: string, zone: string): string {
  return format(locale, {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    hour: hourOf(locale),
    minute: '2-digit',
    timeZone: zone,
  }).format(new Date(instant));
}

/** Only the time of an instant: "10:30". */
export function clockText(instant: string, locale: string, zone: string): string {
  return format(locale, { hour: hourOf(locale), minute: '2-digit', timeZone: zone }).format(
    new Date(instant),
  );
}

/** A time agreed without a day, `09:00`, as the clock shows it: "9:00 AM". */
export function timeText(time: string, locale: string): string {
  return clockText(`1970-01-01T${time}:00Z`, locale, 'UTC');
}

/** 95 minutes: "1 h 35 min". */
export function minutesText(minutes: number): string {
  const hours = Math.floor(minutes / 60);
  const rest = minutes % 60;
  if (!hours) return `${rest} min`;
  return rest ? `${hours} h ${rest} min` : `${hours} h`;
}

/** The trade day an instant falls on where the shop is. */
export function dayIn(zone: string, instant: Date): string {
  return format('en-CA', {
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    timeZone: zone,
  }).format(instant);
}
