import './theme.css';
import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router';
import { onSignedOut } from './lib/api';
import { queryClient } from './lib/query-client';
import { applyTheme, storedTheme } from './lib/theme';
import { paths } from './paths';
import { createRouter } from './router';

applyTheme(storedTheme());
const router = createRouter();

onSignedOut(() => {
  const { pathname, search } = router.state.location;
  // By loading anew: nothing that was shown stays in memory.
  location.replace(paths.signIn(`${pathname}${search}`));
});

const root = document.getElementById('root');
if (!root) throw new Error('index.html requires an element with the id "root"');
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  </StrictMode>,
);
