import { fuzzOperations } from '../support/fuzz';

describe('nearly right requests, part 2 of 2', () => {
  fuzzOperations(1, 2);
});
