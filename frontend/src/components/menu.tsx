import { useEffect, useId, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';

export interface MenuItem {
  key: string;
  label: string;
  onSelect: () => void;
  /** Of a group of choices: whether this one holds. */
  isChecked?: boolean;
  isDanger?: boolean;
  /** Draws a hairline above. */
  startsGroup?: boolean;
}

export interface MenuProps {
  /** What the menu is called, and its button too unless its own words do. */
  label: string;
  /** The button's content says enough by itself. */
  isButtonNamed?: boolean;
  button: ReactNode;
  items: readonly MenuItem[];
  buttonClassName?: string;
  /** Lines above the items that are no items, such as who is signed in. */
  heading?: ReactNode;
}

/** Menu button after the ARIA pattern: arrow keys, Home, End, first letter, Escape. */
export function Menu({ label, button, items, heading, isButtonNamed = false, buttonClassName = '' }: MenuProps) {
  const [isOpen, setOpen] = useState(false);
  const rootRef = useRef<HTMLDivElement>(null);
  const buttonRef = useRef<HTMLButtonElement>(null);
  const id = useId();

  useEffect(() => {
    if (!isOpen) return undefined;
    entries(rootRef.current)[0]?.focus();
    const closeOutside = (event: PointerEvent) => {
      if (event.target instanceof Node && rootRef.current?.contains(event.target) !== true) setOpen(false);
    };
    document.addEventListener('pointerdown', closeOutside);
    return () => document.removeEventListener('pointerdown', closeOutside);
  }, [isOpen]);

  const close = () => {
    setOpen(false);
    buttonRef.current?.focus();
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key === 'Escape') close();
    else if (event.key === 'Tab') setOpen(false);
    else if (!moveFocus(rootRef.current, event.key)) return;
    if (event.key !== 'Tab') event.preventDefault();
  };

  return (
    <div ref={rootRef} className="relative">
      <button
        ref={buttonRef}
        type="button"
        aria-label={isButtonNamed ? undefined : label}
        aria-haspopup="menu"
        aria-expanded={isOpen}
        aria-controls={isOpen ? id : undefined}
        onClick={() => setOpen(!isOpen)}
        onKeyDown={(event) => {
          if (event.key === 'ArrowDown') setOpen(true);
        }}
        className={buttonClassName}
      >
        {button}
      </button>
      {isOpen && (
        <div className="absolute right-0 z-30 mt-2 min-w-56 bg-raised py-2 shadow-[0_1rem_2.5rem_-0.75rem_rgb(0_0_0/0.35)] outline outline-1 outline-hair">
          {heading}
          <div id={id} role="menu" aria-label={label} tabIndex={-1} onKeyDown={onKeyDown}>
            {items.map((item) => (
              <MenuEntry
                key={item.key}
                item={item}
                onSelect={() => {
                  close();
                  item.onSelect();
                }}
              />
            ))}
          </div>
        </div>
      )}
    </div>
  );
}

function MenuEntry({ item, onSelect }: { item: MenuItem; onSelect: () => void }) {
  const isChoice = item.isChecked !== undefined;
  return (
    <button
      type="button"
      role={isChoice ? 'menuitemradio' : 'menuitem'}
      aria-checked={isChoice ? item.isChecked === true : undefined}
      tabIndex={-1}
      onClick={onSelect}
      className={`flex w-full items-center justify-between gap-6 px-4 py-2 text-left hover:bg-accent-soft focus:bg-accent-soft focus-visible:outline-offset-[-2px] ${item.isDanger === true ? 'text-rust' : ''} ${item.startsGroup === true ? 'mt-2 border-t border-hair pt-3' : ''}`}
    >
      <span>{item.label}</span>
      {item.isChecked === true && <span aria-hidden="true">✓</span>}
    </button>
  );
}

function entries(root: HTMLElement | null): HTMLElement[] {
  return [...(root?.querySelectorAll<HTMLElement>('[role^="menuitem"]') ?? [])];
}

function moveFocus(root: HTMLElement | null, key: string): boolean {
  const all = entries(root);
  const at = all.findIndex((entry) => entry === document.activeElement);
  const startsWith = (entry: HTMLElement) => entry.textContent.toLowerCase().startsWith(key.toLowerCase());
  const target =
    {
      ArrowDown: all[(at + 1) % all.length],
      ArrowUp: all[(at - 1 + all.length) % all.length],
      Home: all[0],
      End: all.at(-1),
    }[key] ??
    (key.length === 1 && key !== ' ' ? [...all.slice(at + 1), ...all.slice(0, at + 1)].find(startsWith) : undefined);
  target?.focus();
  return target !== undefined;
}
