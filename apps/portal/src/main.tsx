import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { Providers } from './app/providers.tsx';
import { Router } from './app/router.tsx';
import { applyTheme, storedTheme } from './lib/theme.ts';
import './index.css';

// The content policy refuses eval, which schemas would try once to see whether they may compile themselves.
Object.assign(globalThis, { __zod_globalConfig: { jitless: true } });
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
