import { detailsWords, subjectLink } from './audit-words';

describe('audit rows in words', () => {
  it('say a change from and to, and what was written beside it', () => {
    const details = { to: 'locked_out', from: 'up', words: 'Call 193' };
    expect(detailsWords({ details })).toBe('from up to locked out, Call 193');
  });

  it('name other details, and leave out what is empty', () => {
    const details = { month: '2031-05', kinds: ['top_loader', 'dryer'], note: null, hours: 4 };
    expect(detailsWords({ details })).toBe('month 2031-05, kinds top loader and dryer, hours 4');
    const id = '01a231d1-9a18-764e-aad6-86bed2001f97';
    expect(detailsWords({ details: { lines: [`job:${id}:labour`], bearer: 'shop' } })).toBe(
      'bearer shop',
    );
    expect(detailsWords({ details: {} })).toBe('');
  });

  it('lead to what has a page', () => {
    expect(subjectLink({ subjectKind: 'visit', subjectId: 'v1' })).toEqual(['/shop/visits', 'v1']);
    expect(subjectLink({ subjectKind: 'consent', subjectId: 'c1' })).toBeUndefined();
    expect(subjectLink({ subjectKind: null, subjectId: null })).toBeUndefined();
  });
});
