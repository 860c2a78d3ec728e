import { v7 as uuid } from 'uuid';
import { type Context } from '../../core/context';
import { rows } from '../../core/database/tenancy';
import { type CellError } from './planned-row';

export interface KnownClient {
  id: string;
  /** Null for one the file brings without a number: it gets the next free one. */
  number: string | null;
  name: string;
}

interface Standing extends KnownClient {
  endedAt: Date | null;
  /** The row of the file that brought it. */
  row?: number;
}

interface Named {
  clientNumber?: string;
  clientName?: string;
}

/** Finds the client a row names by number or name, or takes note of a new one. */
export async function clientFinder(context: Context) {
  const all = await rows<Standing>(
    `select id, number, name, ended_at as "endedAt" from clients where shop_id = $shopId
     order by created_at, id`,
    { shopId: context.shopId },
  );
  const byId = new Map(all.map((client) => [client.id, client]));
  const byNumber = new Map(all.map((client) => [client.number ?? '', client]));
  const byName = new Map<string, Standing[]>();
  const note = (client: Standing) => {
    const name = client.name.toLowerCase();
    byName.set(name, [...(byName.get(name) ?? []), client]);
    if (client.number !== null) byNumber.set(client.number, client);
  };
  for (const client of all) if (!client.endedAt) note(client);
  const added: KnownClient[] = [];

  /** The client of a row; undefined when `errors` says why not. */
  function find(
    row: number,
    { clientNumber: number, clientName: name }: Named,
    ownerId: string | undefined,
    errors: CellError[],
  ): KnownClient | undefined {
    const wrong = (column: string, detail: string) => {
      errors.push({ column, detail });
      return undefined;
    };
    const owner = ownerId === undefined ? undefined : byId.get(ownerId);
    if (owner) {
      if (number !== undefined && number !== owner.number) {
        return wrong('Client number', `is not the store’s client: that is ${said(owner)}`);
      }
      if (name !== undefined && name.toLowerCase() !== owner.name.toLowerCase()) {
        return wrong('Client name', `is not the store’s client: that is ${said(owner)}`);
      }
      return owner;
    }
    const known = number === undefined ? undefined : byNumber.get(number);
    if (known?.endedAt) return wrong('Client number', 'is of a client that ended');
    if (known) {
      return name === undefined || name.toLowerCase() === known.name.toLowerCase()
        ? known
        : wrong('Client name', `does not go with the number: that is ${said(known)}`);
    }
    if (name === undefined) {
      return number === undefined
        ? wrong('Client name', 'is missing, and so is the number')
        : wrong('Client name', 'is needed for a client that is new');
    }
    const namesakes = byName.get(name.toLowerCase()) ?? [];
    if (number === undefined && namesakes.length > 1) {
      return wrong('Client number', 'is needed: several clients have this name');
    }
    const namesake = namesakes[0];
    if (namesake && number === undefined) return namesake;
    if (namesake?.number === null) {
      return wrong(
        'Client number',
        `is missing in row ${namesake.row}, where the client is named first`,
      );
    }
    const client: Standing = { id: uuid(), number: number ?? null, name, endedAt: null, row };
    note(client);
    added.push(client);
    return client;
  }

  return { find, added: () => added };
}

function said(client: KnownClient): string {
  return client.number === null ? client.name : `${client.number} ${client.name}`;
}
