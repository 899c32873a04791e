import type { LeadingConfiguration } from '#engine';
import { formatFixed } from '../../numbers';

/** Spatial occupations, the weights of their determinants summed. */
export function LeadingConfigurations({
  configurations,
}: {
  readonly configurations: readonly LeadingConfiguration[];
}) {
  if (configurations.length === 0) return null;
  return (
    <table className="numbers">
      <thead>
        <tr>
          <th scope="col">
            <abbr title="Orbitals, counted from 0, with their electrons">Leading configurations</abbr>
          </th>
          <th scope="col">Weight</th>
        </tr>
      </thead>
      <tbody>
        {configurations.map((configuration) => {
          const name = configurationText(configuration);
          return (
            <tr key={name}>
              <th scope="row">{name}</th>
              <td>{formatFixed(configuration.weight, 6)}</td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

/** `0² 1² 3¹ 4¹` */
export function configurationText({ doublyOccupied, singlyOccupied }: LeadingConfiguration): string {
  return [
    ...doublyOccupied.map((orbital) => [orbital, '²'] as const),
    ...singlyOccupied.map((orbital) => [orbital, '¹'] as const),
  ]
    .sort(([a], [b]) => a - b)
    .map(([orbital, electrons]) => `${orbital}${electrons}`)
    .join(' ');
}
