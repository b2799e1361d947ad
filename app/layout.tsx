import '@fontsource-variable/inter';
import '@fontsource-variable/source-serif-4/opsz.css';
import './tokens.css';
import './global.css';
import type { Metadata } from 'next';
import { headers } from 'next/headers';
import { NuqsAdapter } from 'nuqs/adapters/next/app';
import type { ReactNode } from 'react';
import { THEME_SCRIPT } from './components/theme.ts';

/** Every page answers from the database as it stands now. */
export const dynamic = 'force-dynamic';

export const metadata: Metadata = {
  title: { default: 'Hungerstone', template: '%s · Hungerstone' },
  description: 'Which rivers of a region are losing their low flows, how fast and how surely.',
};

export default async function RootLayout({ children }: { children: ReactNode }) {
  const nonce = (await headers()).get('x-nonce') ?? undefined;
  return (
    <html lang="en" suppressHydrationWarning>
      <head>
        {/* Runs before the first paint, so that a chosen theme never flashes the other one. */}
        <script nonce={nonce} suppressHydrationWarning>
          {THEME_SCRIPT}
        </script>
      </head>
      <body>
        <a className="skip-link" href="#main">
          Skip to the content
        </a>
        <NuqsAdapter>{children}</NuqsAdapter>
      </body>
    </html>
  );
}
