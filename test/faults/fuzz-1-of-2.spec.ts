import { fuzzOperations } from '../support/fuzz';

describe('nearly right requests, part 1 of 2', () => {
  fuzzOperations(0, 2);
});
