/**
 * The Message-ID of a mail, made from the id of its row: whoever hands the same mail over twice, by
 * whatever accident, hands over the same Message-ID, and mail programs show it once.
 */
export function messageIdOf(mailId: string, from: string): string {
  const address = /<(.+)>/.exec(from)?.[1] ?? from;
  const host = address.slice(address.lastIndexOf('@') + 1) || 'localhost';
  return `<${mailId}@${host}>`;
}
