/** Whether the last request reached the server. The API client tells it; the page's notice listens. */
type Listener = () => void;

const listeners = new Set<Listener>();
let isReachable = true;

export function reportReachable(reachable: boolean): void {
  if (reachable === isReachable) return;
  isReachable = reachable;
  for (const listener of listeners) listener();
}

export function isServerReachable(): boolean {
  return isReachable;
}

export function subscribeToReachability(listener: Listener): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}
