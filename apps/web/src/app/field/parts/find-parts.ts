import { type KeptPart } from '../kept/kept';

/** Parts that hold every word of the search in number, name or category; numbers that begin so first. */
export function findParts(parts: readonly KeptPart[], words: string, most: number): KeptPart[] {
  const wanted = fold(words).split(/\s+/).filter(Boolean);
  if (wanted.length === 0) return [];
  return parts
    .filter((part) => {
      const text = fold(`${part.number} ${part.name} ${part.category}`);
      return wanted.every((word) => text.includes(word));
    })
    .sort((a, b) => Number(begins(b, wanted[0])) - Number(begins(a, wanted[0])))
    .slice(0, most);
}

function begins(part: KeptPart, word = ''): boolean {
  return fold(part.number).startsWith(word);
}

/** So that "Türschloss" is found by "tursch". */
function fold(text: string): string {
  return text.normalize('NFD').replaceAll(/\p{M}/gu, '').toLowerCase();
}
