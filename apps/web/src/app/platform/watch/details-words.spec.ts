import { detailsWords } from './details-words';

describe('detailsWords', () => {
  it('tells what is there in one line', () => {
    expect(detailsWords({ plan: 'Depot', note: '', shops: 3, offered: true })).toBe(
      'plan: Depot, shops: 3, offered: true',
    );
  });

  it('says nothing of nothing', () => expect(detailsWords({})).toBe(''));
});
