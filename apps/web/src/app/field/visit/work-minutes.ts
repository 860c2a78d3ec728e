import { type Sheet } from '../kept/kept';

const least = 5;
const most = 60;
const unknown = 10;

/**
 * How long the machine in hand has probably taken: since the last one was done, or since arriving,
 * in steps of five minutes. A suggestion, for the tech to put right.
 */
export function workMinutes(sheet: Sheet, now: Date): number {
  const done = sheet.jobs.map(({ doneAt }) => doneAt);
  const since = [sheet.visit.arrivedAt, ...done]
    .filter((at) => at !== null)
    .sort()
    .at(-1);
  if (!since) return unknown;
  const minutes = (now.getTime() - Date.parse(since)) / 60_000;
  return Math.min(most, Math.max(least, Math.ceil(minutes / 5) * 5));
}
