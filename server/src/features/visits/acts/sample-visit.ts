import { type Act, type ActKind, actPayloads } from '@lib/contracts';
import { cautionsFor } from '@lib/domain';
import { type z } from 'zod';
import { type DatedAct, type VisitFacts } from './visit-record';

/** Ids that read well in a failing spec. */
export const idOf = (n: number): string => `00000000-0000-7000-8000-${String(n).padStart(12, '0')}`;

export const washer = idOf(1);
export const gasDryer = idOf(2);
export const imre = { membershipId: idOf(900), name: 'Imre' };
export const zoe = { membershipId: idOf(901), name: 'Zoe' };

/** A store with a washer in A-01 and a gas dryer in A-02, on which nothing stands in the way. */
export function sampleFacts(changes: Partial<VisitFacts> = {}): VisitFacts {
  return {
    cancelled: false,
    latest: Date.parse('2031-05-07T09:00:00Z'),
    ticket: null,
    machines: new Map([
      [washer, { bay: 'A-01', kind: 'front_loader', energy: 'electric', retired: false }],
      [gasDryer, { bay: 'A-02', kind: 'dryer', energy: 'gas', retired: false }],
    ]),
    callIds: new Set(),
    partIds: new Set(),
    causeIds: new Set(),
    takenIds: new Set(),
    openItemIds: new Set(),
    photoOwners: new Map(),
    keptJobIds: new Set(),
    ...changes,
  };
}

let serial = 0;

/** An act on 6 May 2031 at a minute past nine. */
export function actAt<K extends ActKind>(
  minute: number,
  kind: K,
  payload: z.input<(typeof actPayloads)[K]>,
  by = imre,
): DatedAct {
  const at = Date.parse('2031-05-06T09:00:00Z') + minute * 60_000;
  const act = {
    id: idOf(10_000 + ++serial),
    kind,
    at: new Date(at).toISOString(),
    payload: actPayloads[kind].parse(payload),
  } as Act;
  return { act, at, seq: serial, by };
}

export function ticked(minute: number, jobId: string): DatedAct {
  const cautions = cautionsFor('front_loader', 'electric').map((caution) => caution.code);
  return actAt(minute, 'cautions_ticked', { jobId, cautions });
}
