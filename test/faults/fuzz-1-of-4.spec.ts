import { fuzzOperations } from '../support/fuzz';

describe('nearly right requests, part 1 of 4', () => {
  fuzzOperations(0, 4);
});
