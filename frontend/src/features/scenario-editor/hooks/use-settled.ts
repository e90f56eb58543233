import { useState } from 'react';
import { isSameValue } from '../model/same-value.ts';

/** The value with its earlier identity as long as its content is the same, so that readers do not render anew. */
export function useSettled<T>(value: T): T {
  const [kept, setKept] = useState(value);
  if (kept === value || isSameValue(kept, value)) return kept;
  setKept(value);
  return value;
}
