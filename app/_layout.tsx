import '@/components/parsing';
import '@/components/theme.css';

import { QueryClientProvider } from '@tanstack/react-query';
import { Slot, type ErrorBoundaryProps } from 'expo-router';
import { useState } from 'react';

import { AppShell } from '@/components/shell';
import { FailurePage } from '@/components/shell/FailurePage';
import { ToastProvider } from '@/components/ui';
import { createQueryClient } from '@/lib/client/queryClient';

export default function RootLayout() {
  const [queryClient] = useState(createQueryClient);
  return (
    <QueryClientProvider client={queryClient}>
      <ToastProvider>
        <AppShell>
          <Slot />
        </AppShell>
      </ToastProvider>
    </QueryClientProvider>
  );
}

/** Takes the place of everything when drawing a page failed. */
export function ErrorBoundary({ error, retry }: ErrorBoundaryProps) {
  return <FailurePage error={error} onRetry={() => void retry()} />;
}

export { PageSkeleton as SuspenseFallback } from '@/components/members/PageSkeleton';
