import { type Act, type ActKind, actPayloads, type PriceBook } from '@lib/contracts';
import { cautionsFor, type Energy, type MachineKind } from '@lib/domain';
import { v7 as uuid } from 'uuid';
import { type z } from 'zod';
import { type Context } from '../../server/src/core/context';
import { row } from '../../server/src/core/database/tenancy';
import { firstBook } from '../../server/src/features/prices/first-book';
import { recordActs } from '../../server/src/features/visits/acts/record-acts';
import { planVisit } from '../../server/src/features/visits/plan-visit';
import { signOff } from '../../server/src/features/tickets/sign-off';
import {
  buildBank,
  buildClient,
  buildMachine,
  buildPerson,
  buildShop,
  buildStore,
  insert,
  inShop,
  next,
  type TestPerson,
  type TestShop,
} from './factories';

/** A price book with round figures, so that a spec can say what comes out. */
export function plainBook(changes: Partial<PriceBook> = {}): PriceBook {
  return {
    ...firstBook('USD'),
    labour: {
      normalPerHour: 120_00,
      afterHoursPerHour: 180_00,
      minimumMinutes: 30,
      incrementMinutes: 15,
    },
    trips: [{ label: 'everywhere', amount: 90_00 }],
    tripCost: 30_00,
    markup: { bands: [{ fromUnitCost: 0, basisPoints: 10_000 }], step: 1, rounding: 'nearest' },
    taxes: {
      rates: [{ place: '', kind: 'part', basisPoints: 1_000, validFrom: '2000-01-01' }],
      rounding: 'invoice',
    },
    warranty: {
      labourDays: 30,
      partDays: 60,
      partDaysByCategory: { door: 180 },
      excludedCauses: ['misuse', 'vandalism', 'supply'],
      callbackDays: 14,
      nothingFoundBearer: 'store',
      confirmAbove: 500_00,
    },
    ...changes,
  };
}

export interface Scene {
  shop: TestShop;
  owner: TestPerson & { name: string };
  office: TestPerson;
  tech: TestPerson & { name: string };
  clientId: string;
  storeId: string;
  /** Three front loaders and a gas dryer. */
  machines: { id: string; bay: string; kind: MachineKind; energy: Energy }[];
}

/** A shop with prices, an owner, an office, a tech who costs 36.00 an hour, and one store. */
export async function buildScene(book: PriceBook = plainBook()): Promise<Scene> {
  const shop = await buildShop();
  await insert(shop, 'editions', {
    number: 1,
    valid_from: '2000-01-01',
    book: JSON.stringify(book),
  });
  const owner = { ...(await buildPerson(shop, 'shop_owner', { name: 'Odile' })), name: 'Odile' };
  const office = await buildPerson(shop, 'office', { name: 'Ruth' });
  const tech = { ...(await buildPerson(shop, 'tech', { name: 'Imre' })), name: 'Imre' };
  await insert(shop, 'crew_profiles', {
    membership_id: tech.membershipId,
    initials: 'IM',
    cost_per_hour: 36_00,
  });
  const clientId = await buildClient(shop);
  const { storeId, machines } = await buildFloor(shop, clientId);
  return { shop, owner, office, tech, clientId, storeId, machines };
}

/** A store of the client with three front loaders and a gas dryer. */
export async function buildFloor(
  shop: TestShop,
  client_id: string,
): Promise<Pick<Scene, 'storeId' | 'machines'>> {
  const storeId = await buildStore(shop, { client_id });
  const bank_id = await buildBank(shop, { client_id, store_id: storeId });
  const machines: Scene['machines'] = [];
  for (let n = 1; n <= 4; n++) {
    const kind = n === 4 ? 'dryer' : 'front_loader';
    const energy = n === 4 ? 'gas' : 'electric';
    const bay = `A-0${n}`;
    const of = { client_id, store_id: storeId, bank_id, bay, bay_number: n, kind, energy };
    const id = await buildMachine(shop, { ...of, state_since: new Date('2020-01-01') });
    machines.push({ id, bay, kind, energy });
  }
  return { storeId, machines };
}

export async function buildPart(
  shop: TestShop,
  values: { category: string; unit_cost: number; name?: string },
): Promise<string> {
  const n = next();
  return insert(shop, 'parts', { number: `P-${n}`, name: `Part ${n}`, ...values });
}

function contextOf(scene: Scene, role: 'owner' | 'office' | 'tech', now: Date): Context {
  const person = scene[role];
  return {
    requestId: 'spec',
    now,
    shopId: scene.shop.id,
    userId: person.userId,
    membershipId: person.membershipId,
    name: role === 'tech' ? scene.tech.name : role,
    role: role === 'owner' ? 'shop_owner' : role,
    clientId: null,
    storeId: null,
  };
}

type PayloadIn<K extends ActKind> = z.input<(typeof actPayloads)[K]>;

/** Makes acts as a phone would: each with its own id, a second after the one before. */
export class Phone {
  #at: number;

  constructor(start: Date = new Date()) {
    this.#at = start.getTime();
  }

  act<K extends ActKind>(kind: K, payload: PayloadIn<K>): Act {
    this.#at += 1000;
    const at = new Date(this.#at).toISOString();
    return { id: uuid(), kind, at, payload: actPayloads[kind].parse(payload) } as Act;
  }

  /** Lets the clock run on. */
  later(seconds: number): this {
    this.#at += seconds * 1000;
    return this;
  }

  openJob(machine: Scene['machines'][number], jobId: string, callId?: string): Act[] {
    return [
      this.act('job_opened', { jobId, machineId: machine.id, callId: callId ?? null }),
      this.act('cautions_ticked', {
        jobId,
        cautions: cautionsFor(machine.kind, machine.energy).map((caution) => caution.code),
      }),
    ];
  }

  /** A whole repair of one machine. */
  repair(machine: Scene['machines'][number], job: Repair): Act[] {
    const { jobId } = job;
    return [
      ...this.openJob(machine, jobId, job.callId),
      this.act('finding', {
        jobId,
        code: 'broken',
        category: job.category ?? 'door',
        words: job.found ?? 'Broken.',
      }),
      this.act('cause', { jobId, cause: job.cause ?? 'wear' }),
      this.act('action', { jobId, words: job.did ?? 'Put right.' }),
      this.act('minutes', { jobId, minutes: job.minutes ?? 30 }),
      ...(job.partIds ?? []).map((partId) =>
        this.act('part_used', { jobId, partUseId: uuid(), partId, source: job.source ?? 'van' }),
      ),
      this.act('job_done', {
        jobId,
        result: job.result ?? 'put_right',
        machineState: job.result === 'unfinished' ? 'down' : 'up',
      }),
    ];
  }
}

export interface Repair {
  jobId: string;
  callId?: string;
  category?: string;
  cause?: Extract<Act, { kind: 'cause' }>['payload']['cause'];
  found?: string;
  did?: string;
  minutes?: number;
  partIds?: string[];
  source?: Extract<Act, { kind: 'part_used' }>['payload']['source'];
  result?: 'put_right' | 'unfinished';
}

/** A visit of the past, worked by the tech and completed, and signed off unless told otherwise. */
export async function buildPastVisit(
  scene: Scene,
  daysAgo: number,
  acts: (phone: Phone) => Act[],
  options: { signOff?: boolean } = {},
): Promise<{ visitId: string; ticketId: string | null }> {
  const start = new Date(Date.now() - daysAgo * 86_400_000 - 3_600_000);
  const now = new Date(start.getTime() + 1_800_000);
  const visit = await planVisit(contextOf(scene, 'office', start), {
    storeId: scene.storeId,
    plannedOn: start.toISOString().slice(0, 10),
    techMembershipId: scene.tech.membershipId,
    callIds: [],
    reason: 'Repair',
  });
  const phone = new Phone(start);
  const all = [phone.act('arrived', {}), ...acts(phone), phone.act('signed_off', {})];
  const recorded = await recordActs(contextOf(scene, 'tech', now), visit.id, all);
  const refused = recorded.results.filter((result) => result.outcome !== 'stored');
  if (refused.length > 0) throw new Error(`The past was refused: ${JSON.stringify(refused)}`);
  if (options.signOff === false) return { visitId: visit.id, ticketId: null };
  const ticket = await signOff(contextOf(scene, 'office', now), visit.id);
  return { visitId: visit.id, ticketId: ticket.id };
}

/** What a table holds of the shop, for specs that look behind the answers. */
export async function stored<T extends object>(
  scene: Pick<Scene, 'shop'>,
  sql: string,
  bind: Record<string, unknown> = {},
): Promise<T> {
  return (await inShop(scene.shop, () => row<T>(sql, { shopId: scene.shop.id, ...bind }))) as T;
}
