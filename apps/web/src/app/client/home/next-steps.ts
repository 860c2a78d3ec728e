import { missedTakings } from '@lib/domain/downtime/takings';
import { type Call, type HomeFacts, type MachineSummary, type VisitItem } from './home-api';

type Known = Pick<HomeFacts, 'notUp' | 'visits' | 'calls'>;

/** A machine that takes no money, and who is on the way to it. */
export interface Still {
  readonly machine: MachineSummary;
  /** The first visit that comes for it. */
  readonly visit: VisitItem | undefined;
  /** Reported, but no visit is planned yet. */
  readonly called: boolean;
  /** Takings missed until now, minor units; 0 also where no money is shown. */
  readonly missed: number;
}

/** Machines that stand still, the one that costs most first. */
export function standingStill(known: Known, now: Date): Still[] {
  return known.notUp
    .filter(standsStill)
    .map((machine) => ({
      machine,
      visit: inOrder(known.visits).find((visit) => comesFor(visit, machine, known.calls)),
      called: known.calls.some((call) => call.machine?.id === machine.id),
      missed: missedTakings(machine.takingsADay ?? 0, new Date(machine.stateSince), now),
    }))
    .sort((a, b) => b.missed - a.missed);
}

export type Step =
  | { readonly kind: 'visit'; readonly visit: VisitItem; readonly calls: readonly Call[] }
  | { readonly kind: 'call'; readonly call: Call }
  | { readonly kind: 'machine'; readonly machine: MachineSummary };

/**
 * What happens next: the visits to come in their order, then calls no visit is planned for yet, then
 * machines that run with a fault and nobody is on the way to.
 */
export function nextSteps({ notUp, visits, calls }: Known): Step[] {
  const toVisits = inOrder(visits).map((visit): Step => {
    return { kind: 'visit', visit, calls: calls.filter((call) => call.visit?.id === visit.id) };
  });
  const open = calls.filter((call) => call.state === 'open');
  const left = notUp.filter(
    (machine) =>
      !standsStill(machine) &&
      !open.some((call) => call.machine?.id === machine.id) &&
      !visits.some((visit) => comesFor(visit, machine, calls)),
  );
  return [
    ...toVisits,
    ...open.map((call): Step => ({ kind: 'call', call })),
    ...left.map((machine): Step => ({ kind: 'machine', machine })),
  ];
}

/** The list gives days in order; within a day, who promised a time comes first. */
function inOrder(visits: readonly VisitItem[]): VisitItem[] {
  const from = (visit: VisitItem) => `${visit.plannedOn} ${visit.window?.from ?? 'any time'}`;
  return [...visits].sort((a, b) => (from(a) < from(b) ? -1 : 1));
}

function comesFor(visit: VisitItem, machine: MachineSummary, calls: readonly Call[]): boolean {
  if (machine.store.id === visit.store.id && visit.bays.includes(machine.bay)) return true;
  return calls.some((call) => call.visit?.id === visit.id && call.machine?.id === machine.id);
}

/** A machine that runs with a fault still takes money. */
function standsStill({ state }: MachineSummary): boolean {
  return state === 'down' || state === 'locked_out';
}
