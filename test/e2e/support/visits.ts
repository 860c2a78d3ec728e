import { v7 as uuid } from 'uuid';
import { cautionsFor } from '../../../libs/domain/src/cautions/cautions';
import { type Energy, type MachineKind } from '../../../libs/domain/src/words/trade';
import { ShopApi } from './shop-api';
import { type Works } from './works';

interface Machine {
  id: string;
  bay: string;
  kind: MachineKind;
  energy: Energy;
}

/** A visit of today for the shop's tech; returns its id. */
export async function planVisit(works: Works, storeName: string, reason: string): Promise<string> {
  const office = await ShopApi.of(works.office);
  const tech = await ShopApi.of(works.tech);
  const stores = await office.get<{ items: { id: string }[] }>(
    `/api/stores?q=${encodeURIComponent(storeName)}`,
  );
  const visit = await office.post<{ id: string }>('/api/visits', {
    storeId: stores.items[0]?.id,
    plannedOn: new Date().toLocaleDateString('en-CA', { timeZone: 'America/Chicago' }),
    techMembershipId: tech.membershipId,
    reason,
  });
  return visit.id;
}

/** A hinge that our tech fitted earlier today: what a later fault can follow from. */
export async function fitHinge(works: Works, storeName: string, bay: string): Promise<void> {
  const visitId = await planVisit(works, storeName, 'Door sits crooked');
  const tech = await ShopApi.of(works.tech);
  const sheet = await tech.get<{ machines: Machine[] }>(`/api/visits/${visitId}/sheet`);
  const machine = sheet.machines.find((each) => each.bay === bay);
  if (!machine) throw new Error(`${storeName} has no ${bay}.`);
  const cautions = cautionsFor(machine.kind, machine.energy).map(({ code }) => code);
  const jobId = uuid();
  const acts: [kind: string, payload: object][] = [
    ['arrived', {}],
    ['job_opened', { jobId, machineId: machine.id }],
    ['cautions_ticked', { jobId, cautions }],
    ['finding', { jobId, code: 'misaligned', category: 'door', words: 'Hinge loose' }],
    ['cause', { jobId, cause: 'wear' }],
    ['action', { jobId, words: 'Hinge fitted and set' }],
    ['minutes', { jobId, minutes: 35 }],
    ['job_done', { jobId, result: 'put_right', machineState: 'up' }],
    ['signed_off', {}],
  ];
  const start = Date.now() - acts.length * 1000;
  const sent = acts.map(([kind, payload], at) => {
    return { id: uuid(), kind, at: new Date(start + at * 1000).toISOString(), payload };
  });
  const answer = await tech.post<{ results: { outcome: string; reason: string }[] }>(
    `/api/visits/${visitId}/acts`,
    { acts: sent },
  );
  const refused = answer.results.find(({ outcome }) => outcome !== 'stored');
  if (refused) throw new Error(`The hinge could not be fitted: ${refused.reason}`);
}
