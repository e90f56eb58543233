import { fireEvent, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { renderRoutes, resetUi } from '#test/support/ui.tsx';
import { useListParams } from './use-list-params.ts';

afterEach(resetUi);

function Probe() {
  const [params, setParams] = useListParams('-updatedAt');
  return (
    <>
      <output aria-label="params">{JSON.stringify(params)}</output>
      <button onClick={() => setParams({ page: 3 })}>page</button>
      <button onClick={() => setParams({ sort: 'name' })}>sort</button>
      <button onClick={() => setParams({ sort: '-updatedAt', q: '' })}>reset</button>
    </>
  );
}

const at = (address: string) => renderRoutes([{ path: '/', element: <Probe /> }], address);
const shown = (): unknown => JSON.parse(screen.getByLabelText('params').textContent);

describe('useListParams', () => {
  it('reads the address and falls back to the first page in the given order', () => {
    at('/?page=x');
    expect(shown()).toEqual({ page: 1, sort: '-updatedAt', q: '', archived: 'false', origin: 'all' });
  });

  it('writes a page into the address', () => {
    const { router } = at('/?q=frost');
    fireEvent.click(screen.getByRole('button', { name: 'page' }));
    expect(router.state.location.search).toBe('?q=frost&page=3');
  });

  it('goes to the first page with any other change', () => {
    const { router } = at('/?page=3');
    fireEvent.click(screen.getByRole('button', { name: 'sort' }));
    expect(router.state.location.search).toBe('?sort=name');
  });

  it('leaves what is the default out of the address', () => {
    const { router } = at('/?sort=name&q=frost');
    fireEvent.click(screen.getByRole('button', { name: 'reset' }));
    expect(router.state.location.search).toBe('');
  });
});
