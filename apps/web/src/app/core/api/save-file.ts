import { type AnsweredFile } from './api';

/** Hands a file to the browser to keep. */
export function saveFile(file: AnsweredFile): void {
  follow(file, (link) => (link.download = file.name));
}

/** Shows a file in a tab of its own. */
export function openFile(file: AnsweredFile): void {
  follow(file, (link) => {
    link.target = '_blank';
    link.rel = 'noopener';
  });
}

function follow(file: AnsweredFile, prepare: (link: HTMLAnchorElement) => void): void {
  const address = URL.createObjectURL(file.content);
  const link = document.createElement('a');
  link.href = address;
  prepare(link);
  link.click();
  // The browser needs the address a while longer; keeping it for good would keep the file in memory.
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
}
