import { handle } from '../../core/http/route';
import { journalFile, listEntries, trialBalanceOn } from './read-ledger';

export const ledgerRoutes = [
  handle('ledger.trialBalance', (context, { query }) => trialBalanceOn(context, query)),
  handle('ledger.entries', (context, { query }) => listEntries(context, query)),
  handle('ledger.journal', (context, { query }) => journalFile(context, query)),
];
