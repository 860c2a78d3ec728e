import { openApiDocument, problemsOf } from './openapi';
import { operations } from './operations';

describe('the API document', () => {
  const document = openApiDocument(operations, '1') as {
    paths: Record<string, Record<string, { requestBody?: { required: boolean } }>>;
  };
  const bodyOf = (method: string, path: string) => document.paths[path]?.[method]?.requestBody;

  it('asks for a body only where a field of it must be there', () => {
    expect(bodyOf('post', '/api/platform/shops/{shopId}/pause')?.required).toBe(false);
    expect(bodyOf('post', '/api/clients')?.required).toBe(true);
    expect(bodyOf('post', '/api/imports')?.required).toBe(true);
  });

  it('tells of a paused shop where that is what refuses', () => {
    expect(problemsOf(operations['clients.create'])).toContain('shop-paused');
    expect(problemsOf(operations['clients.list'])).not.toContain('shop-paused');
    expect(problemsOf(operations['subscription.choose'])).not.toContain('shop-paused');
    expect(problemsOf(operations['platform.pause'])).not.toContain('shop-paused');
    expect(problemsOf(operations['session.switch'])).not.toContain('shop-paused');
  });
});
