/** Tells the other tabs of this browser that a survey has grown, and hears it from them. */
export interface Tabs {
  tell(survey: string): void
  /** Returns how to stop listening. */
  listen(heard: (survey: string) => void): () => void
  close(): void
}

export function openTabs(name: string): Tabs {
  const channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(name)
  return {
    tell: (survey) => channel?.postMessage(survey),
    listen(heard) {
      const listener = (event: MessageEvent<unknown>) => {
        if (typeof event.data === 'string') heard(event.data)
      }
      channel?.addEventListener('message', listener)
      return () => channel?.removeEventListener('message', listener)
    },
    close: () => channel?.close(),
  }
}
