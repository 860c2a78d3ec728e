import { handle } from '../../core/http/route';
import { changeBank, createBank } from './banks';
import { changeCondition, clearCondition, createCondition, listConditions } from './conditions';
import { listMachines, showMachine } from './read-machines';
import {
  changeMachine,
  createMachine,
  moveMachine,
  retireMachine,
  setMachineState,
} from './write-machines';

export const machinesRoutes = [
  handle('banks.create', (context, { params, body }) => createBank(context, params.storeId, body)),
  handle('banks.change', (context, { params, version, body }) =>
    changeBank(context, params.bankId, version, body),
  ),
  handle('machines.list', (context, { query }) => listMachines(context, query)),
  handle('machines.show', (context, { params }) => showMachine(context, params.machineId)),
  handle('machines.create', (context, { body }) => createMachine(context, body)),
  handle('machines.change', (context, { params, version, body }) =>
    changeMachine(context, params.machineId, version, body),
  ),
  handle('machines.setState', (context, { params, version, body }) =>
    setMachineState(context, params.machineId, version, body),
  ),
  handle('machines.retire', (context, { params, version, body }) =>
    retireMachine(context, params.machineId, version, body),
  ),
  handle('machines.move', (context, { params, version, body }) =>
    moveMachine(context, params.machineId, version, body),
  ),
  handle('conditions.list', (context, { params, query }) =>
    listConditions(context, params.storeId, query.show),
  ),
  handle('conditions.create', (context, { body }) => createCondition(context, body)),
  handle('conditions.change', (context, { params, version, body }) =>
    changeCondition(context, params.conditionId, version, body),
  ),
  handle('conditions.clear', (context, { params, version }) =>
    clearCondition(context, params.conditionId, version),
  ),
];
