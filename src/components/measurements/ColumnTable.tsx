import { type Role, roleText, type Sheet } from '@/client/curves/measured-csv.ts';
import { counted } from '@/components/ui/numbers.ts';

interface Props {
  sheet: Sheet;
  roles: readonly Role[];
  onRole: (column: number, role: Role) => void;
}

const SHOWN = 5;
const choices = Object.entries(roleText) as [Role, string][];

/** The first lines of the file, with what each column is taken for. */
export function ColumnTable({ sheet, roles, onRole }: Props) {
  const rest = sheet.rows.length - SHOWN;
  return (
    <div className="min-w-0 overflow-x-auto">
      <table className="w-full text-left">
        <caption className="mb-1 text-left font-semibold">Columns</caption>
        <thead>
          <tr className="border-ink border-b align-bottom">
            {sheet.heads.map((head, at) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: columns have no other name that is theirs alone
              <th key={at} scope="col" className="py-1.5 pr-4 font-normal">
                <span className="block font-mono text-tiny">{head || `column ${at + 1}`}</span>
                <select
                  aria-label={`${head || `column ${at + 1}`} is`}
                  className="mt-1 min-h-8 max-w-56 border-ink border-b bg-ground font-semibold"
                  value={roles[at]}
                  onChange={(event) => onRole(at, event.target.value as Role)}
                >
                  {choices.map(([role, text]) => (
                    <option key={role} value={role}>
                      {text}
                    </option>
                  ))}
                </select>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {sheet.rows.slice(0, SHOWN).map((row, i) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: lines are shown in the file's order and never move
            <tr key={i} className="border-hair border-b">
              {sheet.heads.map((_, at) => (
                // biome-ignore lint/suspicious/noArrayIndexKey: as above
                <td key={at} className="py-1 pr-4 font-mono text-tiny">
                  {row[at] ?? ''}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {rest > 0 && <p className="mt-1 text-quiet text-tiny">and {counted(rest, 'more line')}</p>}
    </div>
  );
}
