import { cleanFileName } from './file-name';

describe('the name of an uploaded file', () => {
  it.each([
    ['hinge.jpg', 'hinge.jpg'],
    ['../../etc/passwd', 'passwd'],
    ['C:\\photos\\hinge.jpg', 'hinge.jpg'],
    ['a\u0000b\r\n"c".png', 'ab"c".png'],
    ['Türscharnier 5€.webp', 'Türscharnier 5€.webp'],
    ['\ud800.png', '\ufffd.png'],
    ['', 'file'],
    ['..//', 'file'],
    ['x'.repeat(500), 'x'.repeat(120)],
  ])('%j is kept as %j', (sent, kept) => {
    expect(cleanFileName(sent)).toBe(kept);
  });
});
