import { v7 as uuid } from 'uuid';
import { type PriceBook } from '@lib/contracts';
import { systemContext } from '../core/context';
import { platformRows, withTenant, write } from '../core/database/tenancy';
import { createFirstEdition } from '../features/prices/create-first-edition';
import { ask } from './ask';
import { faults, partPlans } from './faults';
import { addPerson, type Person } from './people';
import { type Random } from './random';
import { type ClientPlan, makers, type ShopPlan, type StorePlan } from './world';

export interface DemoMachine {
  id: string;
  bay: string;
  kind: ClientPlan['stores'][number]['banks'][number]['kind'];
  energy: ClientPlan['stores'][number]['banks'][number]['energy'];
  underSupplierWarranty: boolean;
}

export interface DemoStore {
  id: string;
  clientId: string;
  plan: StorePlan;
  machines: DemoMachine[];
  attendant: Person;
}

export interface DemoShop {
  id: string;
  plan: ShopPlan;
  owner: Person;
  office: Person;
  techs: Person[];
  clientOwners: Person[];
  stores: DemoStore[];
  parts: Map<string, string>;
}

/** Everything of a shop before its first call: settings, prices, crew, clients, stores, machines. */
export async function setUpShop(plan: ShopPlan, opened: Date, random: Random): Promise<DemoShop> {
  const id = await openShop(plan, opened);
  const shop = { id, name: plan.name };
  const crew: { role: string; person: Person }[] = [];
  for (const member of plan.crew) {
    const person = await addPerson(shop, member.name, { role: member.role });
    crew.push({ role: member.role, person });
    await withTenant(systemContext(id, opened), () =>
      write(
        `insert into crew_profiles (shop_id, id, membership_id, initials, van, cost_per_hour)
         values ($id, $profile, $membership, $initials, $van, $cost)`,
        {
          id,
          profile: uuid(),
          membership: person.membershipId,
          initials: member.initials,
          van: member.van,
          cost: 3800,
        },
      ),
    );
  }
  const owner = crew.find((c) => c.role === 'shop_owner')?.person as Person;
  const office = crew.find((c) => c.role === 'office')?.person as Person;
  const demo: DemoShop = {
    id,
    plan,
    owner,
    office,
    techs: crew.filter((c) => c.role === 'tech').map((c) => c.person),
    clientOwners: [],
    stores: [],
    parts: new Map(),
  };
  await setPrices(demo, opened);
  for (const client of plan.clients) await addClient(demo, client, opened, random);
  return demo;
}

async function openShop(plan: ShopPlan, opened: Date): Promise<string> {
  const id = uuid();
  await platformRows(
    `insert into shops (id, name, zone, currency, locale, created_at)
     values ($id, $name, $zone, $currency, $locale, $opened)`,
    { id, name: plan.name, zone: plan.zone, currency: plan.currency, locale: plan.locale, opened },
  );
  await platformRows(
    `insert into subscriptions (shop_id, id, plan_id, state, state_since, current_period_ends_at)
     select $shopId, $id, p.id, 'active', $opened, now() + interval '12 days' from plans p where p.code = $code`,
    { shopId: id, id: uuid(), opened, code: plan.planCode },
  );
  await platformRows(
    `insert into subscription_events (shop_id, id, at, event, from_state, to_state)
     values ($shopId, $id, $opened, 'payment_succeeded', 'trialing', 'active')`,
    { shopId: id, id: uuid(), opened },
  );
  await withTenant(systemContext(id, opened), async () => {
    await write(
      `insert into shop_settings (shop_id, id, address, tax_number, phone, mail_name, close_by_schedule, terms_days,
         late_charge_basis_points, set_up_at)
       values ($shopId, $id, $address, $tax, $phone, $name, $schedule, 14, 0, $opened)`,
      {
        shopId: id,
        id: uuid(),
        address: plan.address,
        tax: plan.taxNumber,
        phone: plan.phone,
        name: plan.name,
        schedule: plan.closeBySchedule,
        opened,
      },
    );
    await createFirstEdition(systemContext(id, opened));
  });
  return id;
}

async function setPrices(shop: DemoShop, opened: Date): Promise<void> {
  const owner = shop.owner.at(opened);
  const first = await ask(owner, 'prices.inForce', {});
  const day = opened.toISOString().slice(0, 10);
  const book: PriceBook = {
    ...(first.book as PriceBook),
    taxes: {
      rounding: 'line',
      rates: shop.plan.taxes.map((tax) => ({ place: shop.plan.taxPlace, validFrom: day, ...tax })),
    },
  };
  await ask(owner, 'editions.create', {
    body: { validFrom: day, note: 'First prices of our own', book },
  });
  for (const part of partPlans) {
    const made = await ask(owner, 'parts.create', { body: { ...part } });
    shop.parts.set(part.number, made.id);
  }
}

async function addClient(
  shop: DemoShop,
  plan: ClientPlan,
  opened: Date,
  random: Random,
): Promise<void> {
  const office = shop.office.at(opened);
  const client = await ask(office, 'clients.create', {
    body: {
      name: plan.name,
      ...(plan.taxExempt ? { taxExempt: true, taxExemptReference: 'Charity certificate 88' } : {}),
    },
  });
  const owner = await addPerson({ id: shop.id, name: shop.plan.name }, plan.owner, {
    role: 'client_owner',
    clientId: client.id,
  });
  shop.clientOwners.push(owner);
  for (const storePlan of plan.stores) {
    const store = await ask(office, 'stores.create', {
      body: {
        clientId: client.id,
        name: storePlan.name,
        address: storePlan.address,
        accessWords: storePlan.accessWords,
        hours: '6:00 to 22:00',
        taxPlace: shop.plan.taxPlace,
      },
    });
    await ask(office, 'contacts.create', {
      body: {
        clientId: client.id,
        storeId: store.id,
        name: plan.owner,
        email: owner.email,
        getsStatements: true,
        getsVisits: true,
      },
    });
    const attendant = await addPerson({ id: shop.id, name: shop.plan.name }, storePlan.attendant, {
      role: 'attendant',
      clientId: client.id,
      storeId: store.id,
    });
    const made: DemoStore = {
      id: store.id,
      clientId: client.id,
      plan: storePlan,
      machines: [],
      attendant,
    };
    for (const bank of storePlan.banks) await addBank(shop, made, bank, opened, random);
    await addConditions(shop, made, opened);
    shop.stores.push(made);
  }
}

async function addBank(
  shop: DemoShop,
  store: DemoStore,
  bank: StorePlan['banks'][number],
  opened: Date,
  random: Random,
): Promise<void> {
  const office = shop.office.at(opened);
  const made = await ask(office, 'banks.create', {
    params: { storeId: store.id },
    body: { letter: bank.letter, words: bank.words },
  });
  const maker = makers[bank.make] as (typeof makers)[number];
  for (let n = 1; n <= bank.machines; n++) {
    const young = random.chance(0.15);
    const installed = new Date(
      opened.getTime() - (young ? 100 : 700 + random.below(2500)) * 86_400_000,
    );
    const machine = await ask(office, 'machines.create', {
      body: {
        bankId: made.id,
        bayNumber: n,
        kind: bank.kind,
        energy: bank.energy,
        make: maker.make,
        model: maker.models[n % maker.models.length] as string,
        serial: `${maker.make.slice(0, 2).toUpperCase()}${100_000 + random.below(900_000)}`,
        installedOn: installed.toISOString().slice(0, 10),
        volts: 230,
        amps: 16,
        vendPrice: bank.kind === 'dryer' ? 200 : 350 + random.below(3) * 50,
        cyclesADay: 3 + random.below(6),
        ...(young
          ? {
              supplierWarrantyUntil: new Date(installed.getTime() + 365 * 86_400_000)
                .toISOString()
                .slice(0, 10),
            }
          : {}),
      },
    });
    store.machines.push({
      id: machine.id,
      bay: machine.bay,
      kind: bank.kind,
      energy: bank.energy,
      underSupplierWarranty: young,
    });
  }
}

async function addConditions(shop: DemoShop, store: DemoStore, opened: Date): Promise<void> {
  for (const { bay, ...condition } of store.plan.conditions) {
    await ask(shop.office.at(opened), 'conditions.create', {
      body: {
        storeId: store.id,
        ...condition,
        machineId: store.machines.find((m) => m.bay === bay)?.id ?? null,
      },
    });
  }
}

/** Faults a machine of this kind can have. */
export function faultsOf(machine: DemoMachine) {
  return faults.filter((fault) => fault.kinds.includes(machine.kind));
}
