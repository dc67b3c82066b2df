import { Check, Minus } from 'lucide-react'
import { Sheet } from '@/app/_components/ui/sheet'
import { type Role, roleSchema, roleWords } from '@/lib/sites/permissions'
import { roleTable } from '@/lib/sites/role-words'

const roles = roleSchema.options

/** What the server goes by, in words. */
export function RoleTable({ role: own }: { role: Role }) {
  return (
    <Sheet title="What each role may do" id="roles">
      <table className="w-full border-collapse text-left">
        <caption className="sr-only">What each role may do</caption>
        <thead>
          <tr className="border-b border-edge">
            <td />
            {roles.map((role) => (
              <th
                key={role}
                scope="col"
                className={`py-2 text-center text-small font-semibold sm:text-label ${role === own ? 'text-heart' : 'text-ink-soft'}`}
              >
                {roleWords[role]}
                {role === own ? <span className="block">yours</span> : null}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {roleTable(roles).map((line) => (
            <tr key={line.words} className="border-b border-line last:border-b-0">
              <th scope="row" className="py-3 pr-3 font-normal">
                {line.words}
              </th>
              {line.may.map((yes, index) => (
                <td key={roles[index]} className="w-[54px] text-center sm:w-24">
                  {yes ? (
                    <Check aria-hidden="true" size={18} strokeWidth={2.5} className="mx-auto text-good" />
                  ) : (
                    <Minus aria-hidden="true" size={14} strokeWidth={1.5} className="mx-auto text-ink-soft" />
                  )}
                  <span className="sr-only">{yes ? 'yes' : 'no'}</span>
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </Sheet>
  )
}
