import { type AnswerOf } from '../../core/http/route';

export type Import = AnswerOf<'imports.show'>;

export interface ImportRow {
  id: string;
  kind: Import['kind'];
  file_name: string;
  sha256: string;
  state: Import['state'];
  rows_total: number;
  rows_done: number;
  count_new: number;
  count_changed: number;
  count_unchanged: number;
  count_bad: number;
  problem: string | null;
  plan_sha256: string | null;
  by_user_id: string;
  attempt: number;
  version: number;
  created_at: Date;
}

export const importColumns = `id, kind, file_name, sha256, state, rows_total, rows_done, count_new,
  count_changed, count_unchanged, count_bad, problem, plan_sha256, by_user_id, attempt, version,
  created_at`;

export function presentImport(row: ImportRow): Import {
  return {
    id: row.id,
    kind: row.kind,
    fileName: row.file_name,
    state: row.state,
    rowsTotal: row.rows_total,
    rowsDone: row.rows_done,
    counts: {
      new: row.count_new,
      changed: row.count_changed,
      unchanged: row.count_unchanged,
      bad: row.count_bad,
    },
    problem: row.problem,
    createdAt: row.created_at.toISOString(),
    version: row.version,
  };
}
