import { Loading } from './components/notes.tsx';

export default function SiteLoading() {
  return (
    <main id="main">
      <Loading />
    </main>
  );
}
