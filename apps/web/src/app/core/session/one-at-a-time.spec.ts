import { oneAtATime } from './one-at-a-time';

describe('oneAtATime', () => {
  const locks = Object.getOwnPropertyDescriptor(navigator, 'locks');

  afterEach(() => {
    if (locks) Object.defineProperty(navigator, 'locks', locks);
    else Reflect.deleteProperty(navigator, 'locks');
  });

  it('works behind the lock of the browser', async () => {
    const held: string[] = [];
    Object.defineProperty(navigator, 'locks', {
      configurable: true,
      value: {
        request: (name: string, work: () => Promise<unknown>) => {
          held.push(name);
          return work();
        },
      },
    });
    expect(await oneAtATime('tw.session', () => Promise.resolve(7))).toBe(7);
    expect(held).toEqual(['tw.session']);
  });

  it('works without one where the browser has none', async () => {
    Object.defineProperty(navigator, 'locks', { configurable: true, value: undefined });
    expect(await oneAtATime('tw.session', () => Promise.resolve(7))).toBe(7);
  });
});
