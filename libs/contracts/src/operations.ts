import { clientOperations } from './clients';
import { conditionOperations } from './conditions';
import { contactOperations } from './contacts';
import { exportOperations } from './exports';
import { fileOperations } from './files';
import { importOperations } from './imports';
import { liveOperations } from './live';
import { bankOperations, machineOperations } from './machines';
import { partOperations } from './parts';
import { priceOperations } from './prices';
import { accountOperations, sessionOperations } from './session';
import { settingsOperations } from './settings';
import { storeOperations } from './stores';

/** Everything the API can do: the server answers exactly these, the document lists exactly these. */
export const operations = {
  ...sessionOperations,
  ...accountOperations,
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
  ...liveOperations,
};

export type Operations = typeof operations;
export type OperationId = keyof Operations;
