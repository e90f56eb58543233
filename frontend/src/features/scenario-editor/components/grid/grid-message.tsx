import { useEditorState, useProblems } from '#frontend/features/scenario-editor/hooks/editor-context.tsx';

/** What is wrong in a table, in a place that is always there: nothing below it moves. */
export function GridMessage({ fieldPrefix }: { fieldPrefix: string }) {
  const pending = useEditorState((state) => state.pending);
  const problems = useProblems();
  const inside = (field: string): boolean => field.startsWith(fieldPrefix);
  const unsettled = Object.entries(pending).filter(([field]) => inside(field));
  const others = [...problems].filter(([field]) => inside(field) && !(field in pending));
  const messages = [...unsettled.map(([, { message }]) => message), ...others.map(([, message]) => message)];
  const [first, ...rest] = messages;
  return (
    <p role="status" className="min-h-11 pt-1 text-small text-rust sm:min-h-6">
      {first}
      {rest.length > 0 && ` And ${rest.length} more cell${rest.length === 1 ? '' : 's'}.`}
    </p>
  );
}
