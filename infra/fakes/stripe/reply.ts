export interface Reply {
  status: number;
  headers: Record<string, string>;
  body: string;
}
