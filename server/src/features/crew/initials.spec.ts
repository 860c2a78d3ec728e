import { initialsFor } from './initials';

describe('initials', () => {
  it('are of the first and the last name', () => {
    expect(initialsFor('Rosa Quill')).toBe('RQ');
    expect(initialsFor('Jean-Luc van der Berg')).toBe('JB');
    expect(initialsFor('åsa öberg')).toBe('ÅÖ');
    expect(initialsFor('Cher')).toBe('CH');
  });

  it('are another mark when somebody has them', () => {
    expect(initialsFor('Rosa Quill', ['RQ'])).toBe('RQu');
    expect(initialsFor('Rosa Quill', ['RQ', 'RQu'])).toBe('RQ2');
  });

  it('exist for any name, at most four long', () => {
    for (const name of ['7', '  ', 'X', "O'Neil", 'Ω']) {
      const mark = initialsFor(name);
      expect(mark.length).toBeGreaterThan(0);
      expect(mark.length).toBeLessThanOrEqual(4);
    }
  });
});
