type Message = 'changed' | 'signed-out';

const channel =
  typeof BroadcastChannel === 'undefined' ? undefined : new BroadcastChannel('tw.session');

/** Tabs of one browser share a session: what one does to it, the others must follow. */
export const tabs = {
  tell(message: Message): void {
    channel?.postMessage(message);
  },

  onMessage(heed: (message: Message) => void): void {
    channel?.addEventListener('message', (event: MessageEvent<Message>) => heed(event.data));
  },
};
