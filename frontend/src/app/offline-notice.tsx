import { useIsOffline } from './use-is-offline.ts';

/** Stands in the head while the server does not answer, and goes by itself. */
export function OfflineNotice() {
  const isOffline = useIsOffline();
  return (
    <div role="status" className="no-print">
      {isOffline && (
        <p className="border-b border-caution bg-raised">
          <span className="page block py-2 text-caution">
            <strong className="font-extrabold">The server cannot be reached.</strong> What you type is kept in this
            browser.
          </span>
        </p>
      )}
    </div>
  );
}
