import { fuzzOperations } from '../support/fuzz';

describe('nearly right requests, part 2 of 4', () => {
  fuzzOperations(1, 4);
});
