import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { Pagination } from './pagination.tsx';

afterEach(cleanup);

describe('Pagination', () => {
  it('is left out when one page holds everything', () => {
    const { container } = render(<Pagination page={1} pageSize={25} total={25} what="projects" onPage={vi.fn()} />);
    expect(container.textContent).toBe('');
  });

  it('tells which rows are shown and leads on and back', () => {
    const onPage = vi.fn();
    render(<Pagination page={2} pageSize={25} total={61} what="projects" onPage={onPage} />);
    expect(screen.getByText('26 to 50 of 61 projects')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Next page' }));
    fireEvent.click(screen.getByRole('button', { name: 'Earlier page' }));
    expect(onPage.mock.calls).toEqual([[3], [1]]);
  });

  it('leads back from past the last page', () => {
    const onPage = vi.fn();
    render(<Pagination page={9} pageSize={25} total={61} what="projects" onPage={onPage} />);
    expect(screen.getByRole('button', { name: 'Next page' }).hasAttribute('disabled')).toBe(true);
    fireEvent.click(screen.getByRole('button', { name: 'Earlier page' }));
    expect(onPage).toHaveBeenCalledExactlyOnceWith(3);
  });
});
