import { QueryClientProvider } from '@tanstack/react-query';
import { Outlet } from 'react-router-dom';
import { Toasts } from '../ui/toast.tsx';
import { queryClient } from './query-client.ts';

/** Pages on which something is read or done: they share the cache and may show toasts. */
export function WorkLayout() {
  return (
    <QueryClientProvider client={queryClient}>
      <Outlet />
      <Toasts />
    </QueryClientProvider>
  );
}
