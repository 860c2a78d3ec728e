import { clockIn } from '../visits/clock-in';
import { type VisitItem } from '../visits/visits-api';

/** A visit placed on the line of the day, in percent of its length. */
interface PlacedVisit {
  readonly visit: VisitItem;
  readonly start: number;
  readonly width: number;
  /** Which of the lanes under one another, so that visits at one time do not hide each other. */
  readonly lane: number;
}

export interface DayLine {
  /** Full hours the day is drawn from and to. */
  readonly from: number;
  readonly until: number;
}

export interface Row {
  readonly placed: readonly PlacedVisit[];
  readonly lanes: number;
  /** Visits without a promised time. */
  readonly anyTime: readonly VisitItem[];
}

const usual: DayLine = { from: 8, until: 17 };

/** The hours a day sheet shows: the usual ones, and more where visits need more. */
export function lineOf(visits: readonly VisitItem[], zone: string): DayLine {
  const windows = visits.flatMap(({ window }) => (window ? [window] : []));
  return {
    from: Math.min(usual.from, ...windows.map((w) => Math.floor(minutesIn(zone, w.from) / 60))),
    until: Math.max(usual.until, ...windows.map((w) => Math.ceil(endIn(zone, w) / 60))),
  };
}

/** Lays the visits of one tech along the line, later ones under earlier ones they overlap. */
export function rowOf(visits: readonly VisitItem[], line: DayLine, zone: string): Row {
  const length = (line.until - line.from) * 60;
  const laneEnds: number[] = [];
  const placed = visits
    .flatMap((visit) => (visit.window ? [{ visit, window: visit.window }] : []))
    .map(({ visit, window }) => ({
      visit,
      begin: minutesIn(zone, window.from) - line.from * 60,
      end: endIn(zone, window) - line.from * 60,
    }))
    .sort((a, b) => a.begin - b.begin || a.visit.number - b.visit.number)
    .map(({ visit, begin, end }) => {
      const free = laneEnds.findIndex((laneEnd) => laneEnd <= begin);
      const lane = free < 0 ? laneEnds.length : free;
      laneEnds[lane] = end;
      return {
        visit,
        lane,
        start: (begin / length) * 100,
        width: ((end - begin) / length) * 100,
      };
    });
  return {
    placed,
    lanes: Math.max(1, laneEnds.length),
    anyTime: visits.filter(({ window }) => !window),
  };
}

/** What does not go well with a visit, in words; '' when all is well. */
export function troubleOf(visit: VisitItem, ofTech: readonly VisitItem[], now: Date): string {
  const { window, state, arrivedAt } = visit;
  if (!window || state === 'cancelled' || state === 'completed') return '';
  const waited = (state === 'planned' || state === 'confirmed') && !arrivedAt;
  if (waited && now.toISOString() > new Date(window.until).toISOString())
    return 'nobody is there yet';
  const other = ofTech.find(
    (each) =>
      each.id !== visit.id &&
      each.window &&
      each.state !== 'cancelled' &&
      each.state !== 'completed' &&
      Date.parse(each.window.from) < Date.parse(window.until) &&
      Date.parse(window.from) < Date.parse(each.window.until),
  );
  return other ? `overlaps ${other.store.name}` : '';
}

function minutesIn(zone: string, instant: string): number {
  const [hours = 0, minutes = 0] = clockIn(zone, instant).split(':').map(Number);
  return hours * 60 + minutes;
}

/** A window that runs past midnight ends with the day. */
function endIn(zone: string, window: { from: string; until: string }): number {
  const end = minutesIn(zone, window.until);
  return end > minutesIn(zone, window.from) ? end : 24 * 60;
}
