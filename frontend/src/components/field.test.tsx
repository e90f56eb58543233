import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { CheckField, SelectField, TextArea, TextField } from './field.tsx';

afterEach(cleanup);

function describedBy(element: HTMLElement): string | null | undefined {
  return document.getElementById(element.getAttribute('aria-describedby') ?? '')?.textContent;
}

describe('fields', () => {
  it.each([
    ['TextField', <TextField key="a" label="Name" error="Give it a name." />],
    ['TextArea', <TextArea key="b" label="Name" error="Give it a name." />],
    ['SelectField', <SelectField key="c" label="Name" error="Give it a name." />],
    ['CheckField', <CheckField key="d" label="Name" error="Give it a name." />],
  ])('%s: ties label and error to its control', (_name, field) => {
    render(field);
    const control = screen.getByLabelText('Name');
    expect(control.getAttribute('aria-invalid')).toBe('true');
    expect(describedBy(control)).toBe('Give it a name.');
  });

  it('TextField: describes itself by the hint while nothing is wrong', () => {
    render(<TextField label="Password" hint="At least 12 characters" />);
    const control = screen.getByLabelText('Password');
    expect(control.getAttribute('aria-invalid')).toBeNull();
    expect(describedBy(control)).toBe('At least 12 characters');
  });

  it('TextField: keeps the line below it when there is nothing to say', () => {
    const { container } = render(<TextField label="Name" />);
    expect(container.querySelector('p')?.className).toContain('min-h-5');
  });
});
