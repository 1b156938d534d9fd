import { Letters } from '@/components/math/letters';
import type { RegionLine } from '@/lib/facts/region-texts';

/** Bounds along lines through the region: what is held, what is free, how far, how found. */
export const RegionTable = ({ lines }: { lines: readonly RegionLine[] }) => (
  <div className="xs" tabIndex={0} role="group" aria-label="Bounds along lines through the region, table">
    <table className="region">
      <thead>
        <tr>
          <th scope="col">Along</th>
          <th scope="col">Stable</th>
          <th scope="col">How found</th>
        </tr>
      </thead>
      <tbody>
        {lines.map(({ along, stable, obtained }) => (
          <tr key={along}>
            <th scope="row">
              <Letters text={along} />
            </th>
            <td>
              <Letters text={stable} />
            </td>
            <td>{obtained}</td>
          </tr>
        ))}
      </tbody>
    </table>
  </div>
);
