import { type BookLine } from './book-lines';

interface ComparedLine extends BookLine {
  /** What it was before; undefined when it stood like this, null when it was not there. */
  readonly before: string | null | undefined;
  /** It was there before and is not any more; `value` is empty. */
  readonly gone: boolean;
}

export interface ComparedSection {
  readonly section: string;
  readonly lines: readonly ComparedLine[];
  readonly changes: number;
}

/** Lines of an edition beside those of the one before it; without one, nothing has changed. */
export function compareBooks(
  lines: readonly BookLine[],
  before: readonly BookLine[] | undefined,
): ComparedSection[] {
  const old = new Map((before ?? []).map((line) => [`${line.section} ${line.key}`, line]));
  const compared: ComparedLine[] = lines.map((line) => {
    const was = old.get(`${line.section} ${line.key}`);
    old.delete(`${line.section} ${line.key}`);
    return { ...line, before: before && changedFrom(line, was), gone: false };
  });
  const gone = [...old.values()].map((line) => ({
    ...line,
    value: '',
    before: line.value,
    gone: true,
  }));
  return bySection([...compared, ...gone]);
}

function changedFrom(line: BookLine, was: BookLine | undefined): string | null | undefined {
  if (!was) return null;
  return was.value === line.value ? undefined : was.value;
}

function bySection(lines: readonly ComparedLine[]): ComparedSection[] {
  const names = [...new Set(lines.map(({ section }) => section))];
  return names.map((section) => {
    const own = lines.filter((line) => line.section === section);
    return { section, lines: own, changes: own.filter((l) => l.before !== undefined).length };
  });
}
