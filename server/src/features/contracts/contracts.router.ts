import { handle } from '../../core/http/route';
import { changeClosures, showClosures } from './closures';
import { listContracts, previewRule, showContract } from './read-contracts';
import { listRounds } from './read-rounds';
import { changeContract, createContract, endContract } from './write-contracts';

export const contractsRoutes = [
  handle('contracts.list', (context, { query }) => listContracts(context, query)),
  handle('contracts.preview', (context, { query }) => previewRule(context, query)),
  handle('contracts.show', (context, { params }) => showContract(context, params.contractId)),
  handle('contracts.create', (context, { body }) => createContract(context, body)),
  handle('contracts.change', (context, { params, version, body }) =>
    changeContract(context, params.contractId, version, body),
  ),
  handle('contracts.end', (context, { params, version, body }) =>
    endContract(context, params.contractId, version, body.endsOn),
  ),
  handle('closures.show', (context) => showClosures(context)),
  handle('closures.change', (context, { version, body }) => changeClosures(context, version, body)),
  handle('rounds.list', (context, { query }) => listRounds(context, query)),
];
