import { QueryClientProvider } from '@tanstack/react-query';
import { useState } from 'react';
import { RouterProvider } from 'react-router-dom';
import { ToastRegion } from '#app/components/toast.tsx';
import { createQueryClient } from '#app/lib/query-client.ts';
import { createRouter } from './router.tsx';

/** The whole app: one cache of what the server knows, one router, one place for passing messages. */
export function App() {
  const [queryClient] = useState(createQueryClient);
  const [router] = useState(createRouter);
  return (
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
      <ToastRegion />
    </QueryClientProvider>
  );
}
