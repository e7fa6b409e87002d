import '@fontsource/lora/latin-400.css';
import '@fontsource/lora/latin-400-italic.css';
import '@fontsource/lora/latin-500.css';
import '@fontsource/lora/latin-600.css';
import '@fontsource/lora/latin-ext-400.css';
import '@fontsource/lora/latin-ext-500.css';
import '@fontsource/lora/latin-ext-600.css';
import '@fontsource/source-sans-3/latin-400.css';
import '@fontsource/source-sans-3/latin-600.css';
import '@fontsource/source-sans-3/latin-ext-400.css';
import '@fontsource/source-sans-3/latin-ext-600.css';
import '@fontsource/source-sans-3/greek-400.css';
import '@fontsource/source-sans-3/greek-600.css';
import '#web/styles/index.css';
import { shedServedHead, shedServedTitle } from '#web/lib/served-head.ts';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { Providers } from './providers.tsx';
import { createQueryClient } from './query-client.ts';
import { createRouter } from './router.tsx';

const root = document.getElementById('root');
if (!root) throw new Error('The page has no element with id "root".');

shedServedTitle();
const queryClient = createQueryClient();
const router = createRouter(queryClient);
const first = window.location.pathname;
router.subscribe(({ location }) => { if (location.pathname !== first) shedServedHead(); });
createRoot(root).render(
  <StrictMode>
    <Providers queryClient={queryClient}>
      <RouterProvider router={router} />
    </Providers>
  </StrictMode>,
);
