import { fuzzOperations } from '../support/fuzz';

describe('nearly right requests, part 4 of 4', () => {
  fuzzOperations(3, 4);
});
