import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { QuantityInput, type QuantityInputProps } from './quantity-input.tsx';

afterEach(cleanup);

function renderInput(start: number | undefined, more: Partial<QuantityInputProps> = {}) {
  const committed = vi.fn<(value: number | undefined) => void>();
  function Harness() {
    const [value, setValue] = useState(start);
    return (
      <QuantityInput
        label="Current"
        value={value}
        options={{ dimension: 'current', defaultUnit: 'µA', min: 0 }}
        onCommit={(next) => {
          committed(next);
          setValue(next);
        }}
        {...more}
      />
    );
  }
  render(<Harness />);
  const input = screen.getByLabelText<HTMLInputElement>('Current');
  return { committed, input, type: (text: string) => fireEvent.change(input, { target: { value: text } }) };
}

describe('QuantityInput', () => {
  test.each([
    ['1.7 µA', 1.7e-6],
    ['1.7u', 1.7e-6],
    ['350nA', 3.5e-7],
    ['2', 2e-6],
    ['1,7 mA', 1.7e-3],
  ])('commits %s as it is typed', (text, value) => {
    const { committed, type } = renderInput(1e-3);
    type(text);
    expect(committed).toHaveBeenLastCalledWith(value);
  });

  test('shows what is typed until it is left, then writes it anew', () => {
    const { input, type } = renderInput(1e-6);
    fireEvent.focus(input);
    type('1700n');
    expect(input.value).toBe('1700n');
    fireEvent.blur(input);
    expect(input.value).toBe('1.7 µA');
  });

  test('keeps text that is no value, says what would be one, and commits nothing', () => {
    const { committed, input, type } = renderInput(1e-6);
    type('1.7 apples');
    fireEvent.blur(input);
    expect(input.value).toBe('1.7 apples');
    expect(input.getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByText(/The unit "apples" is not known here/)).toBeDefined();
    expect(committed).not.toHaveBeenCalled();
  });

  test('restores on Escape the value that it had when it was entered', () => {
    const { committed, input, type } = renderInput(1e-6);
    fireEvent.focus(input);
    type('5 mA');
    fireEvent.keyDown(input, { key: 'Escape' });
    expect(committed).toHaveBeenLastCalledWith(1e-6);
    expect(input.value).toBe('1 µA');
  });

  test('leaves the number alone on arrow keys', () => {
    const { committed, input } = renderInput(1e-6);
    fireEvent.keyDown(input, { key: 'ArrowUp' });
    fireEvent.keyDown(input, { key: 'ArrowDown' });
    expect(committed).not.toHaveBeenCalled();
    expect(input.value).toBe('1 µA');
  });

  test('commits nothing for an empty text, or no value where the figure is optional', () => {
    const required = renderInput(1e-6);
    required.type('');
    expect(required.committed).not.toHaveBeenCalled();
    cleanup();
    const optional = renderInput(1e-6, { isOptional: true });
    optional.type('');
    expect(optional.committed).toHaveBeenLastCalledWith(undefined);
  });

  test('follows a value that changes from outside, whatever was typed', () => {
    const props = { label: 'Current', options: { dimension: 'current' } as const, onCommit: () => undefined };
    const { rerender } = render(<QuantityInput {...props} value={1e-6} />);
    const input = screen.getByLabelText<HTMLInputElement>('Current');
    fireEvent.change(input, { target: { value: '2 µA' } });
    rerender(<QuantityInput {...props} value={3e-6} />);
    expect(input.value).toBe('3 µA');
  });

  test('commits text that was wrong as soon as the rule beside it allows it', () => {
    const committed = vi.fn<(value: number | undefined) => void>();
    const under = (maximum: number) => (
      <QuantityInput
        label="Current"
        value={1e-6}
        options={{ dimension: 'current' }}
        onCommit={committed}
        check={(value) => (value <= maximum ? null : 'above the maximum')}
      />
    );
    const { rerender } = render(under(2e-6));
    fireEvent.change(screen.getByLabelText('Current'), { target: { value: '5 µA' } });
    expect(committed).not.toHaveBeenCalled();
    rerender(under(9e-6));
    expect(committed).toHaveBeenCalledExactlyOnceWith(5e-6);
  });
});
