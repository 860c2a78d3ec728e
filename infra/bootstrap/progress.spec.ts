import { readFileSync } from 'node:fs';
import { Advice, report } from './progress.cjs';

describe('what is told when a command fails', () => {
  it('is an advice as it stands, without a stack', () => {
    expect(report(new Advice('It is missing.', 'Install it.'))).toBe(
      'It is missing.\n\nInstall it.',
    );
  });

  it('names a file that may not be written, and what to do', () => {
    const error = Object.assign(new Error('EACCES: permission denied'), {
      code: 'EACCES',
      path: '/srv/tumblewright/dist',
    });
    expect(report(error)).toMatch(/^\/srv\/tumblewright\/dist cannot be written.*\n\n.*chown/);
  });

  it('is a defect with its stack otherwise', () => {
    expect(report(new Error('surprise'))).toContain('progress.spec.ts');
    try {
      readFileSync('/no/such/file');
    } catch (error) {
      expect(report(error)).toContain('ENOENT');
    }
    expect.assertions(2);
  });
});
