import { v7 as uuid } from 'uuid';
import { platformRows } from '../../server/src/core/database/tenancy';
import {
  buildPerson,
  buildShop,
  inShop,
  insert,
  type TestPerson,
  type TestShop,
} from './factories';
import { write } from '../../server/src/core/database/tenancy';

/** A word that no answer to another shop may ever hold. */
export const canaryWord = 'Canarybird';

export interface Canary {
  shop: TestShop;
  person: TestPerson;
  /** The id of the canary row of each tenant table that has ids. */
  ids: Map<string, string>;
}

/** A foreign shop with a row in every tenant table, each naming the canary where it has words. */
export async function buildCanary(): Promise<Canary> {
  const shop = await buildShop({ name: `${canaryWord} shop` });
  const person = await buildPerson(shop, 'shop_owner', { name: canaryWord });
  const ids = new Map<string, string>([['memberships', person.membershipId]]);
  const add = async (table: string, values: Record<string, unknown>): Promise<string> => {
    const id = await insert(shop, table, values);
    ids.set(table, id);
    return id;
  };
  const now = new Date();
  const client_id = await add('clients', { name: canaryWord, number: canaryWord });
  const store_id = await add('stores', { client_id, name: canaryWord, number: canaryWord });
  const here = { client_id, store_id };
  const bank_id = await add('banks', { ...here, letter: 'C', words: canaryWord });
  const machine_id = await add('machines', {
    ...here,
    bank_id,
    bay: 'C-01',
    bay_number: 1,
    kind: 'dryer',
    sticker_code: canaryWord,
    make: canaryWord,
  });
  const contact_id = await add('contacts', {
    ...here,
    name: canaryWord,
    email: 'canary@people.example',
    gets_statements: true,
  });
  await add('conditions', { ...here, machine_id, kind: 'access', words: canaryWord });
  await add('crew_profiles', { membership_id: person.membershipId, initials: 'CB' });
  await add('attachments', {
    client_id,
    owner_kind: 'store',
    owner_id: store_id,
    name: canaryWord,
    content_type: 'image/png',
    bytes: 1,
    sha256: 'c'.repeat(64),
  });
  const import_id = await add('imports', {
    kind: 'stores',
    file_name: canaryWord,
    sha256: 'c'.repeat(64),
    state: 'checked',
    by_user_id: person.userId,
  });
  await inShop(shop, () =>
    write(
      `insert into import_rows (shop_id, import_id, row_number, outcome, label, details)
       values ($shopId, $import_id, 1, 'new', $canaryWord, '{}')`,
      { shopId: shop.id, import_id, canaryWord },
    ),
  );
  await inShop(shop, () =>
    write(`insert into counters (shop_id, kind, value) values ($shopId, 'canary', 1)`, {
      shopId: shop.id,
    }),
  );
  const edition_id = await add('editions', {
    number: 99,
    valid_from: '2020-01-01',
    book: '{}',
    note: canaryWord,
  });
  const part_id = await add('parts', {
    number: canaryWord,
    name: canaryWord,
    category: 'door',
    unit_cost: 100,
  });
  const call_id = await add('calls', {
    ...here,
    machine_id,
    number: 9901,
    symptom: canaryWord,
    reported_by: canaryWord,
    reported_via: 'office',
  });
  const visit_id = await add('visits', {
    ...here,
    number: 9901,
    tech_membership_id: person.membershipId,
    planned_on: '2031-05-06',
    reason: canaryWord,
    state: 'completed',
  });
  await add('acts', {
    visit_id,
    kind: 'arrived',
    payload: '{}',
    by_membership_id: person.membershipId,
    device_at: now,
  });
  await add('visit_times', { visit_id, membership_id: person.membershipId, arrived_at: now });
  const job_id = await add('jobs', {
    ...here,
    visit_id,
    machine_id,
    call_id,
    position: 1,
    finding: canaryWord,
  });
  await add('part_uses', {
    client_id,
    job_id,
    part_id,
    description: canaryWord,
    quantity_milli: 1000,
    source: 'van',
  });
  await add('open_items', { ...here, visit_id, machine_id, words: canaryWord });
  await add('rulings', { visit_id, job_id, line_key: 'c', step: 'proposed', bearer: 'store' });
  const ticket_id = await add('tickets', {
    ...here,
    visit_id,
    number: 9901,
    signed_off_on: '2031-05-06',
    edition_id,
    currency: 'USD',
    list: 100,
    net: 100,
    tax: 0,
    total: 100,
    borne_by_shop: 0,
    own_cost: 0,
  });
  await add('ticket_lines', {
    client_id,
    ticket_id,
    job_id,
    position: 1,
    line_key: 'c',
    kind: 'labour',
    description: canaryWord,
    quantity_milli: 1000,
    unit_price: 100,
    bearer: 'store',
    list: 100,
    charged: 100,
    tax_basis_points: 0,
    tax: 0,
    cost: 0,
  });
  const contract_id = await add('contracts', {
    client_id,
    number: 9901,
    name: canaryWord,
    rule: 'FREQ=MONTHLY',
    starts_on: '2031-01-01',
  });
  await add('contract_stores', { ...here, contract_id, monthly_fee: 100 });
  await add('rounds', { ...here, contract_id, due_on: '2031-05-01', planned_on: '2031-05-01' });
  await add('fees', {
    ...here,
    contract_id,
    kind: 'fee',
    month: '2031-05',
    words: canaryWord,
    net: 100,
    total: 100,
    natural_key: canaryWord,
  });
  await add('entries', {
    ...here,
    document_kind: 'fee',
    document_id: uuid(),
    line_no: 1,
    account: 'unbilled',
    amount: 0,
    posted_on: '2031-05-01',
  });
  const run_id = await add('statement_runs', { month: '2031-05', state: 'done' });
  const statement_id = await add('statements', {
    ...here,
    run_id,
    month: '2031-05',
    number: 9901,
    issued_on: '2031-06-01',
    due_on: '2031-06-15',
    currency: 'USD',
    opening: 0,
    charged: 100,
    tax: 0,
    paid: 0,
    borne_by_shop: 0,
    closing: 100,
    reference: canaryWord,
    snapshot: '{}',
    sha256: 'c'.repeat(64),
  });
  await add('statement_run_stores', { run_id, store_id, statement_id, state: 'built' });
  await inShop(shop, () =>
    write(
      `insert into statement_documents (shop_id, statement_id, client_id, document_kind, document_id)
       values ($shopId, $statement_id, $client_id, 'ticket', $ticket_id)`,
      { shopId: shop.id, statement_id, client_id, ticket_id },
    ),
  );
  await add('deliveries', {
    client_id,
    kind: 'statement',
    statement_id,
    contact_id,
    recipient: 'canary@people.example',
    recipient_name: canaryWord,
    dedupe_key: canaryWord,
    message_id: canaryWord,
    state: 'uncertain',
  });
  const payment_id = await add('payments', {
    ...here,
    number: 9901,
    method: 'cheque',
    state: 'succeeded',
    amount: 100,
    currency: 'USD',
    statement_id,
    received_on: '2031-06-02',
    words: canaryWord,
  });
  await add('refunds', {
    ...here,
    payment_id,
    amount: 1,
    refunded_on: '2031-06-03',
    words: canaryWord,
  });
  await add('closures', {});
  await add('allocations', { client_id, payment_id, statement_id, amount: 100 });
  await add('audit', { what: canaryWord, by_name: canaryWord });
  await add('consents', { given_by: person.userId, until: now });
  await add('shop_usage', { stores: 1 });
  await add('idempotency_keys', {
    membership_id: person.membershipId,
    key: canaryWord,
    operation: 'x',
    fingerprint: 'x',
  });
  const of = { shopId: shop.id, by: person.userId };
  ids.set('invitations', uuid());
  await platformRows(
    `insert into invitations (shop_id, id, email, name, role, token_hash, expires_at, invited_by)
     values ($shopId, $id, 'canary@people.example', $name, 'office', $hash, now() + interval '1 day', $by)`,
    { ...of, id: ids.get('invitations'), name: canaryWord, hash: 'c'.repeat(43) },
  );
  await platformRows(
    `insert into subscription_events (shop_id, id, event) values ($shopId, $id, 'canary')`,
    { shopId: shop.id, id: uuid() },
  );
  return { shop, person, ids };
}
