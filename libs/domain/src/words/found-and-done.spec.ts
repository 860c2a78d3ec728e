import { foundAndDone } from './found-and-done';

describe('what was found and done', () => {
  it.each([
    [['Belt worn smooth', 'Belt fitted'], 'Belt worn smooth. Belt fitted'],
    [['Belt worn smooth.', ' Belt fitted. '], 'Belt worn smooth. Belt fitted'],
    [['', 'Belt fitted'], 'Belt fitted'],
    [[null, undefined, ' '], ''],
  ])('%j', (said, line) => {
    expect(foundAndDone(...said)).toBe(line);
  });
});
