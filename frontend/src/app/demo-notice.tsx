/** In the demo workspace only: nobody takes its figures for measurements. */
export function DemoNotice() {
  return (
    <footer className="page pb-6 text-small text-muted">
      Demo workspace: the company, its nodes and all figures in it are invented.
    </footer>
  );
}
