export interface Progress {
  say(text: string): void;
  step<T>(title: string, work: () => T | Promise<T>): Promise<T>;
}
export class Advice extends Error {
  constructor(message: string, todo?: string);
}
export function createProgress(write?: (text: string) => void): Progress;
export const progress: Progress;
export function reportAndExit(error: unknown): never;
export function report(error: unknown): string;
