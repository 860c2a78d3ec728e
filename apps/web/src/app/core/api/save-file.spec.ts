import { openFile, saveFile } from './save-file';

describe('files handed to the browser', () => {
  const followed: HTMLAnchorElement[] = [];
  const given: string[] = [];

  beforeEach(() => {
    jest.useFakeTimers();
    followed.length = given.length = 0;
    // The test world has no addresses for files and follows no links.
    URL.createObjectURL = () => 'blob:file';
    URL.revokeObjectURL = (address) => given.push(address);
    jest.spyOn(HTMLAnchorElement.prototype, 'click').mockImplementation(function (
      this: HTMLAnchorElement,
    ) {
      followed.push(this);
    });
  });

  afterEach(() => {
    jest.useRealTimers();
    jest.restoreAllMocks();
  });

  const file = { name: 'stores.csv', content: new Blob(['a']) };

  it('are kept under their name', () => {
    saveFile(file);
    expect(followed[0]?.download).toBe('stores.csv');
    expect(followed[0]?.href).toBe('blob:file');
  });

  it('or shown in a tab of their own, which cannot reach back', () => {
    openFile(file);
    expect(followed[0]?.target).toBe('_blank');
    expect(followed[0]?.rel).toBe('noopener');
  });

  it('are let go of after a while', () => {
    saveFile(file);
    expect(given).toEqual([]);
    jest.advanceTimersByTime(60_000);
    expect(given).toEqual(['blob:file']);
  });
});
