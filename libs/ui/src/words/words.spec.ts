import { counted, labelFor, LabelPipe, wordFor, WordPipe } from './words';

describe('words', () => {
  it('names a value as people say it', () => {
    expect(wordFor('locked_out')).toBe('locked out');
    expect(wordFor('shop_error')).toBe('our own mistake');
    expect(labelFor('top_loader')).toBe('Top loader');
  });

  it('counts with the right ending', () => {
    expect(counted(1, 'machine')).toBe('1 machine');
    expect(counted(0, 'machine')).toBe('0 machines');
    expect(counted(2, 'visit that waits', 'visits that wait')).toBe('2 visits that wait');
  });

  it('says the same in templates', () => {
    expect(new WordPipe().transform('in_process')).toBe('in process');
    expect(new LabelPipe().transform('down')).toBe('Down');
  });
});
