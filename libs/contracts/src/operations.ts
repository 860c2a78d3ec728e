import { actOperations } from './acts';
import { callOperations } from './calls';
import { clientOperations } from './clients';
import { conditionOperations } from './conditions';
import { contactOperations } from './contacts';
import { crewOperations } from './crew';
import { deliveryOperations } from './deliveries';
import { exportOperations } from './exports';
import { fileOperations } from './files';
import { importOperations } from './imports';
import { invitationOperations } from './invitations';
import { jobOperations } from './jobs';
import { ledgerOperations } from './ledger';
import { liveOperations } from './live';
import { bankOperations, machineOperations } from './machines';
import { contractOperations } from './maintenance';
import { monthCloseOperations } from './month-close';
import { partOperations } from './parts';
import { paymentOperations } from './payments';
import { platformOperations } from './platform';
import { priceOperations } from './prices';
import { receivableOperations } from './receivables';
import { rulingOperations } from './rulings';
import { accountOperations, sessionOperations } from './session';
import { settingsOperations } from './settings';
import { statementOperations } from './statements';
import { storeOperations } from './stores';
import { ticketOperations } from './tickets';
import { visitOperations } from './visits';
import { subscriptionOperations } from './subscription';

/** Everything the API can do: the server answers exactly these, the document lists exactly these. */
export const operations = {
  ...sessionOperations,
  ...accountOperations,
  ...invitationOperations,
  ...crewOperations,
  ...subscriptionOperations,
  ...platformOperations,
  ...settingsOperations,
  ...clientOperations,
  ...storeOperations,
  ...contactOperations,
  ...bankOperations,
  ...machineOperations,
  ...conditionOperations,
  ...priceOperations,
  ...partOperations,
  ...fileOperations,
  ...importOperations,
  ...exportOperations,
  ...callOperations,
  ...visitOperations,
  ...jobOperations,
  ...actOperations,
  ...rulingOperations,
  ...ticketOperations,
  ...liveOperations,
  ...contractOperations,
  ...monthCloseOperations,
  ...statementOperations,
  ...receivableOperations,
  ...paymentOperations,
  ...deliveryOperations,
  ...ledgerOperations,
};

export type Operations = typeof operations;
export type OperationId = keyof Operations;
