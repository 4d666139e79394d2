import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { createQueryClient } from './app/query-client.ts';
import { createRouter } from './app/router.tsx';
import './styles/pourbook.css';

const root = document.getElementById('root');
if (root === null) throw new Error('index.html has no #root');

const queryClient = createQueryClient();
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={createRouter(queryClient)} />
    </QueryClientProvider>
  </StrictMode>,
);
