import './zod-jitless.ts';
import '../ui/base.css';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { takeLinkTokens } from './link-token.ts';
import { createRouter } from './router.tsx';

const root = document.getElementById('root');
if (root === null) throw new Error('index.html has no #root');

takeLinkTokens();

createRoot(root).render(
  <StrictMode>
    <RouterProvider router={createRouter()} />
  </StrictMode>,
);
