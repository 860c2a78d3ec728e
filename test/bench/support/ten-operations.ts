import { v7 as uuid } from 'uuid';
import { type Shot } from './load';

export interface Asked {
  id: string;
  as: 'office' | 'tech' | 'client_owner';
  shot: (token: string) => Shot;
}

const get = (id: string, as: Asked['as'], path: string): Asked => ({
  id,
  as,
  shot: (token) => ({ method: 'GET', path, headers: { authorization: `Bearer ${token}` } }),
});

/** What people ask most in a day: mostly lists and single rows, and one write. */
export function tenOperations(of: {
  storeId: string;
  visitId: string;
  clientStoreId: string;
}): Asked[] {
  return [
    get('stores.list', 'office', '/api/stores?limit=25'),
    get('stores.floor', 'office', `/api/stores/${of.storeId}/floor`),
    get('machines.list', 'office', '/api/machines?limit=25'),
    get('calls.list', 'office', '/api/calls?limit=25'),
    get('visits.list', 'office', '/api/visits?limit=25'),
    get('visits.show', 'office', `/api/visits/${of.visitId}`),
    get('visits.day', 'tech', '/api/my-day'),
    get('rulings.waiting', 'office', '/api/rulings/waiting'),
    get('statements.list', 'client_owner', '/api/statements?limit=25'),
    {
      id: 'calls.report',
      as: 'office',
      shot: (token) => ({
        method: 'POST',
        path: '/api/calls',
        headers: {
          authorization: `Bearer ${token}`,
          'content-type': 'application/json',
          'idempotency-key': uuid(),
        },
        body: JSON.stringify({ storeId: of.storeId, symptom: 'wont_fill', words: 'Fills slowly' }),
      }),
    },
  ];
}
