import { wordFor } from '@lib/ui/words/words';
import { type Call, type MachineSummary, type VisitItem } from './home-api';

/** "A-03: won’t drain", or what was written where no symptom fits. */
export function callWords(call: Pick<Call, 'machine' | 'symptom' | 'words'>): string {
  const what = call.symptom === 'other' && call.words ? call.words : wordFor(call.symptom);
  return call.machine ? `${call.machine.bay}: ${what}` : what;
}

/** What a visit is for: its calls, else what the shop wrote, else the machines. */
export function visitPurpose(visit: VisitItem, calls: readonly Call[]): string {
  if (calls.length > 0) return calls.map(callWords).join('; ');
  return visit.reason || visit.bays.join(', ') || 'A visit';
}

const standings: Partial<Record<VisitItem['state'], string>> = {
  planned: 'Planned, not agreed with the store yet',
  confirmed: 'Agreed with the store',
  in_process: 'Somebody is there now',
};

export function visitStanding({ state }: Pick<VisitItem, 'state'>): string {
  return standings[state] ?? '';
}

const states: Partial<Record<MachineSummary['state'], string>> = {
  degraded: 'runs with a fault',
  down: 'is down',
  locked_out: 'is locked out',
};

export function machineStanding({ bay, state }: Pick<MachineSummary, 'bay' | 'state'>): string {
  return `${bay} ${states[state] ?? wordFor(state)}`;
}
