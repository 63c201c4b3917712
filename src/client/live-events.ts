export interface Listening {
  /** Asked again at each connection, so that it can say what was seen already. */
  address: () => string;
  event: string;
  onEvent: (data: unknown) => void;
  /** Whether events are coming; while they are not, whoever listens asks by itself. */
  onLive?: (live: boolean) => void;
}

const refusedWaitMs = 10_000;

/** Listens to server-sent events while the page is seen. A hidden page lets its connection go, because a browser
 *  grants one site only six over HTTP/1.1, and many tabs of it would otherwise starve each other. Short breaks are the
 *  browser's own to mend; after a refusal this tries again later.
 *  @returns a function that ends it. */
export function listen({ address, event, onEvent, onLive = () => {} }: Listening): () => void {
  let source: EventSource | null = null;
  let retry: ReturnType<typeof setTimeout> | undefined;
  const close = () => {
    clearTimeout(retry);
    source?.close();
    source = null;
    onLive(false);
  };
  const open = () => {
    if (source || document.hidden) return;
    source = new EventSource(address());
    source.addEventListener('open', () => onLive(true));
    source.addEventListener(event, (message) => onEvent(JSON.parse((message as MessageEvent<string>).data)));
    source.addEventListener('error', () => {
      onLive(false);
      if (source?.readyState !== EventSource.CLOSED) return;
      source = null;
      retry = setTimeout(open, refusedWaitMs);
    });
  };
  const onVisibility = () => (document.hidden ? close() : open());
  document.addEventListener('visibilitychange', onVisibility);
  open();
  return () => {
    document.removeEventListener('visibilitychange', onVisibility);
    close();
  };
}
