import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { Providers } from './app/providers.tsx';
import { Router } from './app/router.tsx';
import { applyTheme, storedTheme } from './lib/theme.ts';
import './index.css';

applyTheme(storedTheme());

const root = document.getElementById('root');
if (root === null) throw new Error('The page has no #root element.');
createRoot(root).render(
  <StrictMode>
    <Providers>
      <Router />
    </Providers>
  </StrictMode>,
);
