import type { CodePair } from '@/lib/intake/types';
import ui from '../ui.module.css';
import styles from './mapping.module.css';

/** Codes that are a station's but for case or leading zeros, and the way to take them for it. */
export function CodeMatches({ pairs, onTake }: { pairs: readonly CodePair[]; onTake(): void }) {
  return (
    <>
      {pairs.length > 0 && (
        <table className={styles.pairs}>
          <thead>
            <tr>
              <th scope="col">In the file</th>
              <th scope="col">In the station list</th>
            </tr>
          </thead>
          <tbody>
            {pairs.map(({ written, registered }) => (
              <tr key={written}>
                <td>
                  <code>{written}</code>
                </td>
                <td>
                  <code>{registered}</code>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      <button type="button" className={ui.button} onClick={onTake}>
        Take them for the stations of the list
      </button>
    </>
  );
}
