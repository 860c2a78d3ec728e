import { accountOperations, sessionOperations } from './session';

/** Everything the API can do: the server answers exactly these, the document lists exactly these. */
export const operations = {
  ...sessionOperations,
  ...accountOperations,
};

export type Operations = typeof operations;
export type OperationId = keyof Operations;
