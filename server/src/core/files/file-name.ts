/** The name of an uploaded file as it may be stored and shown: no folders, no control characters. */
export function cleanFileName(name: string): string {
  const last = name.split(/[\\/]/).at(-1) ?? '';
  const clean = Array.from(last.toWellFormed())
    .filter((character) => (character.codePointAt(0) ?? 0) >= 32 && character !== '\u007f')
    .join('')
    .trim();
  return Array.from(clean).slice(0, 120).join('') || 'file';
}
