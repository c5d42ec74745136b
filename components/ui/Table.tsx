import { useState, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { color, font, space, useLayout } from '../theme';
import { Icon } from './Icon';
import { SelectField } from './SelectField';
import { sortedRows, type Sort } from './sortRows';
import { bodyCell, caption as captionStyle, headCell, headTitle, table } from './tableStyles';
import { Quiet, Text } from './Text';
import { VisuallyHidden } from './VisuallyHidden';

export interface Column<Row> {
  key: string;
  title: string;
  cell: (row: Row) => ReactNode;
  /** Below the title on wide windows, such as the scale of the column's gauges. */
  under?: ReactNode;
  /** Share of the width the column asks for, such as 30 %. */
  width?: string;
  /** Figures are set in the mono face at the right. */
  figures?: boolean;
  /** What the column sorts by; without it, it does not sort. Missing values go last either way. */
  sortValue?: (row: Row) => number | string | null | undefined;
}

export interface TableProps<Row> {
  /** What the table holds, for screen readers; shown when `showCaption`. */
  caption: string;
  showCaption?: boolean;
  /** The first column names the row. */
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  /** For a sort kept in the address; without it the table keeps its own. */
  sort?: Sort;
  onSortChange?: (sort: Sort) => void;
  /** The rows come in their order already. */
  isInOrder?: boolean;
  /** Shown in place of rows when there are none. */
  empty?: string;
}

/** A table with sorting; below 600 px every row becomes a small stack of labelled values. */
export function Table<Row>({ sort: givenSort, onSortChange, isInOrder = false, ...props }: TableProps<Row>) {
  const { isPhone } = useLayout();
  const [ownSort, setOwnSort] = useState<Sort | undefined>(undefined);
  const sort = givenSort ?? ownSort;
  const setSort = onSortChange ?? setOwnSort;
  const column = props.columns.find((one) => one.key === sort?.key);
  const rows = isInOrder ? props.rows : sortedRows(props.rows, column?.sortValue, sort?.descending ?? false);
  if (rows.length === 0 && props.empty) return <Quiet>{props.empty}</Quiet>;
  const shared = { ...props, rows, sort, setSort };
  return isPhone ? <StackedRows {...shared} /> : <WideTable {...shared} />;
}

type PartProps<Row> = Omit<TableProps<Row>, 'sort' | 'onSortChange' | 'isInOrder'> & {
  sort: Sort | undefined;
  setSort: (sort: Sort) => void;
};

const cellContent = (content: ReactNode): ReactNode =>
  content === null || content === undefined || content === '' ? '–' : content;

const placeOf = (columns: readonly { figures?: boolean }[], index: number) => ({
  isFirst: index === 0,
  isLast: index === columns.length - 1,
  isFigures: columns[index]?.figures ?? false,
  isAfterFigures: !columns[index]?.figures && (columns[index - 1]?.figures ?? false),
});

function WideTable<Row>({ caption, showCaption, columns, rows, rowKey, sort, setSort }: PartProps<Row>) {
  return (
    <div className="ebb-quiet-scroll">
      <table style={table}>
        <caption style={showCaption ? captionStyle : undefined}>
          {showCaption ? caption : <VisuallyHidden>{caption}</VisuallyHidden>}
        </caption>
        <thead>
          <tr>
            {columns.map((column, index) => {
              const isSorted = sort?.key === column.key;
              const direction = sort?.descending ? 'descending' : 'ascending';
              return (
                <th
                  key={column.key}
                  scope="col"
                  aria-sort={isSorted ? direction : undefined}
                  style={{ ...headCell(placeOf(columns, index)), width: column.width }}
                >
                  {column.sortValue ? (
                    <button
                      type="button"
                      style={{ ...headTitle(column.figures ?? false), cursor: 'pointer' }}
                      onClick={() => setSort({ key: column.key, descending: isSorted && !sort.descending })}
                    >
                      {column.title}
                      {isSorted && <Icon name={sort.descending ? 'down' : 'up'} size={14} tone="quiet" />}
                    </button>
                  ) : (
                    <span style={headTitle(column.figures ?? false)}>{column.title}</span>
                  )}
                  {column.under}
                </th>
              );
            })}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={rowKey(row)}>
              {columns.map((column, index) => {
                const style = bodyCell(placeOf(columns, index));
                const content = cellContent(column.cell(row));
                return index === 0 ? (
                  <th key={column.key} scope="row" style={style}>
                    {content}
                  </th>
                ) : (
                  <td key={column.key} style={style}>
                    {content}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function StackedRows<Row>({ caption, columns, rows, rowKey, sort, setSort }: PartProps<Row>) {
  const [first, ...others] = columns;
  const sortable = columns.filter((column) => column.sortValue);
  return (
    <View style={styles.stack}>
      {sortable.length > 0 && rows.length > 3 && (
        <SelectField
          label="Sort by"
          value={sort?.key ?? ''}
          options={sortable.map((column) => ({ value: column.key, label: column.title }))}
          onChange={(key) => setSort({ key, descending: false })}
        />
      )}
      <View role="list" aria-label={caption}>
        {rows.map((row) => (
          <View role="listitem" key={rowKey(row)} style={styles.item}>
            {first && <Text weight="strong">{cellContent(first.cell(row))}</Text>}
            {others.map((column) => (
              <View key={column.key} style={styles.pair}>
                <Quiet>{column.title}</Quiet>
                <View style={styles.value}>
                  <Text align="right" style={column.figures && { fontFamily: font.figures }}>
                    {cellContent(column.cell(row))}
                  </Text>
                </View>
              </View>
            ))}
          </View>
        ))}
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  stack: { gap: space.m },
  item: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  pair: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'baseline', gap: space.l },
  value: { flexShrink: 1, minWidth: 0, alignItems: 'flex-end' },
});
