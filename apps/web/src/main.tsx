import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { paths } from './app/paths.js';
import { Providers } from './app/providers.js';
import { createRouter } from './app/router.js';
import { onSignedOut } from './lib/http.js';
import { queryClient } from './lib/query-client.js';
import { watchTheme } from './lib/theme/preference.js';

watchTheme();
const router = createRouter();

onSignedOut(() => {
  const { pathname, search } = router.state.location;
  if (pathname === paths.signIn()) return;
  void router.navigate(paths.signIn(`${pathname}${search}`)).then(() => queryClient.clear());
});

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no element with the id root');
createRoot(root).render(
  <StrictMode>
    <Providers>
      <RouterProvider router={router} />
    </Providers>
  </StrictMode>,
);
