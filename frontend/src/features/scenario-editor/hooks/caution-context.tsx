import { createContext, use, type ReactNode } from 'react';

const CautionContext = createContext<ReadonlyMap<string, string>>(new Map());

/** Gives fields what must be said of their figures: field key to message. */
export function CautionProvider({
  cautions,
  children,
}: {
  cautions: ReadonlyMap<string, string>;
  children: ReactNode;
}) {
  return <CautionContext value={cautions}>{children}</CautionContext>;
}

export function useCaution(field: string): string | undefined {
  return use(CautionContext).get(field);
}

export function useCautions(): ReadonlyMap<string, string> {
  return use(CautionContext);
}
