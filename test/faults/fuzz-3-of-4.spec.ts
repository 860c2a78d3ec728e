import { fuzzOperations } from '../support/fuzz';

describe('nearly right requests, part 3 of 4', () => {
  fuzzOperations(2, 4);
});
