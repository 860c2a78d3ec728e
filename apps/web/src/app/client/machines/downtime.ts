import { type CallItem } from './machines-api';

/** A fault from its report to its end: the time the owner waited for the machine. */
interface Outage {
  readonly call: CallItem;
  readonly minutes: number;
}

const millisecondsAMinute = 60_000;

/** Faults that were reported and done; those taken back kept no machine from work. */
export function outagesOf(calls: readonly CallItem[]): Outage[] {
  return calls.flatMap((call) => {
    if (call.state !== 'closed' || !call.closedAt) return [];
    const milliseconds = Date.parse(call.closedAt) - Date.parse(call.reportedAt);
    return [{ call, minutes: Math.max(0, Math.round(milliseconds / millisecondsAMinute)) }];
  });
}

/** Long times in the words people use for them: "3 days 4 h"; minutes no longer matter then. */
export function lengthText(minutes: number): string {
  const days = Math.floor(minutes / 1440);
  const hours = Math.floor((minutes % 1440) / 60);
  if (days > 0) return `${days} ${days === 1 ? 'day' : 'days'}${hours ? ` ${hours} h` : ''}`;
  return hours > 0 ? `${hours} h` : `${minutes} min`;
}
