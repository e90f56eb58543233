/** In the demo workspace only: nobody takes its figures for measurements. */
export function DemoNotice() {
  return (
    <p className="no-print page pt-3 text-small text-muted">
      Demo workspace: the company, its nodes and all figures in it are invented.
    </p>
  );
}
