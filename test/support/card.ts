/** What a person types into the page of the card payment service. */
export async function payOnCardPage(url: string, number = '4242424242424242'): Promise<Response> {
  return fetch(url, {
    method: 'POST',
    redirect: 'manual',
    body: new URLSearchParams({
      email: 'owner@people.example',
      number,
      expiry: '12 / 44',
      cvc: '123',
      name: 'Olive Owner',
    }),
  });
}
