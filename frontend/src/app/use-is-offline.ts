import { useEffect, useSyncExternalStore } from 'react';
import { isServerReachable, reportReachable, subscribeToReachability } from '#frontend/lib/reachability.ts';

const ASK_AGAIN_MS = 5_000;

/** True from the first request that failed to reach the server until one gets through; asks by itself meanwhile. */
export function useIsOffline(): boolean {
  const isOffline = !useSyncExternalStore(subscribeToReachability, isServerReachable);
  useEffect(() => {
    const goOffline = () => reportReachable(false);
    window.addEventListener('offline', goOffline);
    window.addEventListener('online', askServer);
    return () => {
      window.removeEventListener('offline', goOffline);
      window.removeEventListener('online', askServer);
    };
  }, []);
  useEffect(() => {
    if (!isOffline) return undefined;
    const timer = setInterval(askServer, ASK_AGAIN_MS);
    return () => clearInterval(timer);
  }, [isOffline]);
  return isOffline;
}

function askServer(): void {
  fetch('/api/v1/session', { method: 'GET', credentials: 'same-origin' }).then(
    (response) => reportReachable(response.status < 502),
    () => reportReachable(false),
  );
}
