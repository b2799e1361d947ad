/** Figures by name, one under the other. */
export function FigureTable({ figures }: { figures: readonly (readonly [name: string, value: string])[] }) {
  return (
    <table>
      <tbody>
        {figures.map(([name, value]) => (
          <tr key={name}>
            <th scope="row">{name}</th>
            <td>{value}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
