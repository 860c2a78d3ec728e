import { type AnswerOf } from '../../core/http/route';
import { statementName } from './document-names';

export type StatementItem = AnswerOf<'statements.list'>['items'][number];

export interface StatementRow {
  id: string;
  number: number;
  storeId: string;
  storeName: string;
  clientId: string;
  clientName: string;
  month: string;
  issuedOn: string;
  dueOn: string;
  currency: string;
  opening: number;
  charged: number;
  tax: number;
  paid: number;
  borneByShop: number;
  closing: number;
  open: number;
  pdfReady: boolean;
}

/** What is still to be paid of a statement's own charges; its alias is `s`. */
export const openOfStatement = `(s.charged + s.tax - coalesce((select sum(a.amount)::bigint
  from allocations a where a.shop_id = s.shop_id and a.statement_id = s.id), 0))`;

export const statementFrom = `statements s
  join stores t on t.shop_id = s.shop_id and t.id = s.store_id
  join clients c on c.shop_id = s.shop_id and c.id = s.client_id`;

/** With a limit, because PostgreSQL would otherwise read all attachments of the shop for a page. */
const hasPdf = `(select true from attachments f where f.shop_id = s.shop_id
  and f.owner_kind = 'statement' and f.owner_id = s.id limit 1) is true`;

export const statementColumns = `s.id, s.number, s.store_id as "storeId", t.name as "storeName",
  s.client_id as "clientId", c.name as "clientName", s.month, s.issued_on as "issuedOn",
  s.due_on as "dueOn", s.currency, s.opening, s.charged, s.tax, s.paid,
  s.borne_by_shop as "borneByShop", s.closing, ${openOfStatement} as open,
  ${hasPdf} as "pdfReady"`;

export function presentStatement(statement: StatementRow, today: string): StatementItem {
  const { open, dueOn } = statement;
  return {
    id: statement.id,
    number: statement.number,
    name: statementName(statement.number),
    storeId: statement.storeId,
    storeName: statement.storeName,
    clientId: statement.clientId,
    clientName: statement.clientName,
    month: statement.month,
    issuedOn: statement.issuedOn,
    dueOn,
    currency: statement.currency,
    opening: statement.opening,
    charged: statement.charged,
    tax: statement.tax,
    paid: statement.paid,
    borneByShop: statement.borneByShop,
    closing: statement.closing,
    open,
    state: open <= 0 ? 'paid' : dueOn < today ? 'overdue' : 'open',
    pdfReady: statement.pdfReady,
  };
}
