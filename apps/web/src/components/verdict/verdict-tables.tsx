import { Box } from '@chakra-ui/react';
import type { OrderVerdict, RepeatOrder, TotalVerdict } from '@overtally/contracts';
import { useMemo } from 'react';
import { TableTwin } from '../table-twin.js';
import { orderColumns, totalColumns } from './verdict-columns.js';

interface VerdictTablesProps {
  /** What was judged: "Class A, R-0147, current"; names the tables. */
  subject: string;
  orders: readonly OrderVerdict[];
  totals: readonly TotalVerdict[];
  /** Spread of each order over repeats; absent for a verdict over one analysis. */
  spread?: readonly RepeatOrder[] | undefined;
  /** Unit of the channel. */
  unit: string;
  fileName: string;
  maxHeight?: string;
}

/** The numbers of a verdict: every limited order, then the totals. */
export function VerdictTables({
  subject,
  orders,
  totals,
  spread,
  unit,
  fileName,
  maxHeight,
}: VerdictTablesProps) {
  const columns = useMemo(() => orderColumns(orders, unit, spread), [orders, unit, spread]);
  return (
    <Box>
      {orders.length > 0 ? (
        <TableTwin
          caption={`Orders of ${subject}`}
          columns={columns}
          rows={orders}
          rowKey={(row) => row.order}
          fileName={`${fileName}-orders`}
          {...(maxHeight ? { maxHeight } : {})}
        />
      ) : null}
      {totals.length > 0 ? (
        <Box mt="3">
          <TableTwin
            caption={`Totals of ${subject}`}
            columns={totalColumns(totals)}
            rows={totals}
            rowKey={(row) => row.name}
            fileName={`${fileName}-totals`}
          />
        </Box>
      ) : null}
    </Box>
  );
}
