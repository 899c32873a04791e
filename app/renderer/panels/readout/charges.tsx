import type { AtomicCharges, LevelResult, PointResult } from '#engine';
import { numbered } from '../../numbered';
import { formatFixed } from '../../numbers';

/** Electrons shared out among the atoms, for every level that has a density. */
export function Charges({
  point,
  levels,
}: {
  readonly point: PointResult;
  readonly levels: readonly string[];
}) {
  const rows = levels.flatMap((level) => {
    const charges = chargesOf(point.levels[level]);
    return charges === undefined ? [] : [{ level, charges }];
  });
  if (rows.length === 0 || point.atoms.length < 2) return null;
  return (
    <details className="detailBlock">
      <summary>Charges of the atoms, e</summary>
      {rows.map(({ level, charges: { mulliken, loewdin, spin } }) => (
        <table key={level} className="numbers">
          <thead>
            <tr>
              <th scope="col">{level}</th>
              <th scope="col">Mulliken</th>
              <th scope="col">Löwdin</th>
              {spin && (
                <>
                  <th scope="col">
                    <abbr title="Alpha minus beta electrons, shared out after Mulliken">Spin, Mulliken</abbr>
                  </th>
                  <th scope="col">
                    <abbr title="Alpha minus beta electrons, shared out after Löwdin">Spin, Löwdin</abbr>
                  </th>
                </>
              )}
            </tr>
          </thead>
          <tbody>
            {numbered(point.atoms).map(({ number, item: { element } }) => (
              <tr key={number}>
                <th scope="row">
                  {number} {element}
                </th>
                {[mulliken, loewdin, ...(spin ? [spin.mulliken, spin.loewdin] : [])].map((values, column) => (
                  // biome-ignore lint/suspicious/noArrayIndexKey: the columns are fixed
                  <td key={column}>{formatFixed(values[number] ?? Number.NaN, 4)}</td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      ))}
    </details>
  );
}

/** Of the lowest state. */
export function chargesOf(result: LevelResult | undefined): AtomicCharges | undefined {
  if (result?.kind === 'hartreeFock') return result.charges;
  return result?.kind === 'correlated' ? result.states[0]?.charges : undefined;
}
