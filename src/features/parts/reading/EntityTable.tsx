import type { Reading } from '../../../../shared/drawing/schema.ts'

/** What the file holds, by kind of entity. */
export function EntityTable({ entities }: Pick<Reading, 'entities'>) {
  return (
    <table className="w-full">
      <caption className="sr-only">Entities in the drawing</caption>
      <thead>
        <tr className="text-label uppercase text-muted text-right border-b border-rule">
          <th scope="col" className="font-normal text-left">
            Kind
          </th>
          <th scope="col" className="font-normal">
            Read
          </th>
          <th scope="col" className="font-normal">
            Left out
          </th>
        </tr>
      </thead>
      <tbody>
        {entities.map(({ type, read, ignored }) => (
          <tr key={type} className="border-b border-rule text-right">
            <th scope="row" className="font-normal text-left py-1 break-all">
              {type}
            </th>
            <td>{read}</td>
            <td className={ignored > 0 ? 'font-bold' : 'text-muted'}>{ignored}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
