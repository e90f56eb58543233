import type { ButtonHTMLAttributes, ReactNode } from 'react';
import { Link, type LinkProps } from 'react-router-dom';

export type ButtonVariant = 'primary' | 'quiet' | 'danger';

const BASE =
  'inline-flex items-center justify-center gap-2 rounded-full px-5 min-h-10 text-[0.9375rem] whitespace-nowrap ' +
  'transition-colors disabled:opacity-55 aria-disabled:opacity-55';
const LOOK: Record<ButtonVariant, string> = {
  primary:
    'bg-accent text-on-accent font-semibold hover:not-disabled:bg-[color-mix(in_srgb,var(--accent)_88%,var(--ink))]',
  quiet: 'border border-line text-ink hover:not-disabled:bg-accent-soft',
  danger: 'border border-rust text-rust font-semibold hover:not-disabled:bg-rust hover:not-disabled:text-paper',
};

export interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  variant?: ButtonVariant;
  /** Shown in place of nothing: the label stays, so that the button keeps its width. */
  isBusy?: boolean;
}

export function Button({ variant = 'quiet', isBusy = false, className = '', type = 'button', ...rest }: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-busy={isBusy || undefined}
      disabled={rest.disabled === true || isBusy}
      className={`${BASE} ${LOOK[variant]} ${isBusy ? 'animate-pulse' : ''} ${className}`}
    />
  );
}

/** A link that leads to an action's page, set as a button. */
export function ButtonLink({ variant = 'quiet', className = '', ...rest }: LinkProps & { variant?: ButtonVariant }) {
  return <Link {...rest} className={`${BASE} ${LOOK[variant]} ${className}`} />;
}

export interface IconButtonProps extends Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'children' | 'aria-label'> {
  label: string;
  children: ReactNode;
}

/** A button whose sign needs words: the label is its name and its tip. */
export function IconButton({ label, className = '', type = 'button', children, ...rest }: IconButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-label={label}
      title={label}
      className={`inline-flex size-9 items-center justify-center rounded-full text-muted transition-colors hover:not-disabled:bg-accent-soft hover:not-disabled:text-ink disabled:opacity-40 ${className}`}
    >
      {children}
    </button>
  );
}

/** An action inside running text or a table row. */
export function TextButton({ className = '', type = 'button', ...rest }: ButtonHTMLAttributes<HTMLButtonElement>) {
  return <button {...rest} type={type} className={`link cursor-pointer disabled:opacity-55 ${className}`} />;
}
