import { parentPort } from 'node:worker_threads';
import { type RenderResult, type RenderTask } from './core/documents/render-pool';
import { type StatementSheet, statementPdf } from './features/statements/statement-pdf';

/** The thread that renders documents; one file of its own, started by core/documents/render-pool. */
const templates: Record<string, (data: never) => Promise<Buffer>> = {
  statement: (sheet: StatementSheet) => statementPdf(sheet),
};

parentPort?.on('message', ({ id, template, data }: RenderTask) => {
  const render = templates[template];
  if (!render) return answer({ id, error: `There is no document ${template}` });
  render(data as never).then(
    (bytes) => answer({ id, bytes }),
    (error: unknown) => answer({ id, error: String(error) }),
  );
});

function answer(result: RenderResult): void {
  parentPort?.postMessage(result);
}
