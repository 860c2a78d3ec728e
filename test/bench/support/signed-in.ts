/** An access token of a demo account, as the browser would get it. */
export async function signIn(web: string, email: string, password: string): Promise<string> {
  const answer = await fetch(`${web}/api/session`, {
    method: 'POST',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify({ email, password }),
  });
  if (!answer.ok) throw new Error(`${email} cannot sign in: ${await answer.text()}`);
  return ((await answer.json()) as { accessToken: string }).accessToken;
}
