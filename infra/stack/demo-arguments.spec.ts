import { checkArguments } from './demo-arguments';

describe('npm run demo', () => {
  it.each([[[]], [['--shops', '1']], [['--shops', '200']]])('takes %j', (args) => {
    expect(() => checkArguments(args)).not.toThrow();
  });

  it.each([
    [['--shops']],
    [['--shops', 'many']],
    [['--shops', '0']],
    [['--shops', '5', '6']],
    [['--shop', '5']],
  ])('refuses %j and says how', (args) => {
    expect(() => checkArguments(args)).toThrow(/npm run demo -- --shops 200/);
  });
});
