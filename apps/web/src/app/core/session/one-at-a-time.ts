/**
 * Does `work` while no other tab of this browser does work under the same name. Two tabs renewing at
 * once would present the same refresh token twice, which the server takes for theft.
 */
export async function oneAtATime<T>(name: string, work: () => Promise<T>): Promise<T> {
  const locks = (globalThis.navigator as Partial<Navigator>).locks;
  return locks ? locks.request(name, work) : work();
}
