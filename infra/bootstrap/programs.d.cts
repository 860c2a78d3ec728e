export function findPostgres(): string | undefined;
export function findChromium(): string | undefined;
