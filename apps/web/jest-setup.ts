import { setupZonelessTestEnv } from 'jest-preset-angular/setup-env/zoneless';

setupZonelessTestEnv();

// A slow answer of a busy machine is not a wrong one.
jest.setTimeout(30_000);
