import Link from 'next/link';
import type { Route } from 'next';
import { formatMoney } from '@/lib/client/format';
import type { OrderDetail } from '@/lib/schemas/orders';

export function OrderLines({ order }: { readonly order: OrderDetail }) {
  return (
    <div className="overflow-x-auto">
      <table className="w-full min-w-[36rem]">
        <thead>
          <tr className="border-b-2 border-line text-left text-sm">
            <th scope="col">Substance</th>
            <th scope="col">Stock number</th>
            <th scope="col" className="text-right">
              Packs
            </th>
            <th scope="col" className="text-right">
              Price
            </th>
            <th scope="col" className="text-right">
              Line
            </th>
            <th scope="col" className="pl-4">
              Supplier says
            </th>
            <th scope="col" className="text-right">
              Received
            </th>
          </tr>
        </thead>
        <tbody>
          {order.lines.map((line) => (
            <tr key={line.id} className="border-b">
              <td className="py-2">
                <Link href={`/catalogue/substances/${line.substanceId}` as Route}>{line.substanceName}</Link>
              </td>
              <td className="font-mono">{line.stockNumber}</td>
              <td className="text-right font-mono">
                {line.packs} × {line.packSize}
              </td>
              <td className="text-right font-mono">
                {formatMoney(line.priceMinor, order.currency, 'en-GB')}
              </td>
              <td className="text-right font-mono">
                {formatMoney(line.lineTotalMinor, order.currency, 'en-GB')}
              </td>
              <td className="pl-4">{line.supplierStatus?.replaceAll('-', ' ') ?? 'nothing yet'}</td>
              <td className="text-right font-mono">
                {line.receivedPacks} of {line.packs}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
