import Link from 'next/link';
import { Header } from '@/app/components/header';
import { Empty } from '@/app/components/notes';

export default function StationNotFound() {
  return (
    <>
      <Header />
      <main id="main">
        <Empty title="This region has no station of that code">
          <p>
            Codes are kept as text, and leading zeros count. <Link href="..">The region’s map and ranking</Link> show
            every station it has.
          </p>
        </Empty>
      </main>
    </>
  );
}
