// Real servers on a busy machine: a slow answer is not a wrong one.
jest.setTimeout(60_000);
