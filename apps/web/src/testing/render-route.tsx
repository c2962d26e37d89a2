import { render } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { afterEach } from 'vitest';
import { Providers } from '../app/providers.js';
import { routes } from '../app/router.js';
import { toaster } from '../components/notify.js';

afterEach(() => toaster.remove());

/** Opens an address in the whole application, with its loaders, frame and providers. */
export function renderRoute(address: string) {
  const router = createMemoryRouter(routes, { initialEntries: [address] });
  render(
    <Providers>
      <RouterProvider router={router} />
    </Providers>,
  );
  return { router, user: userEvent.setup() };
}
