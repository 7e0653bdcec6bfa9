import { type ReactNode, useState } from 'react';
import { ScrollView, View } from 'react-native';

import { SPACE, useTokens } from '../theme';
import { Words } from '../words';

export interface Column {
  key: string;
  title: string;
  /** Least width; what is left over is shared. */
  width: number;
  align?: 'left' | 'right';
  /** A second, quieter line under the title. */
  note?: string;
}

export interface Row {
  key: string;
  /** Text is set by the table; anything else as it is. */
  cells: ReactNode[];
  isStrong?: boolean;
}

interface DataTableProps {
  label: string;
  columns: Column[];
  rows: Row[];
  /** The background behind the pinned column. */
  on?: 'paper' | 'surface';
}

/** A table that scrolls inside itself and keeps its first column in sight. */
export function DataTable({ label, columns, rows, on = 'paper' }: DataTableProps) {
  const tokens = useTokens();
  const [room, setRoom] = useState(0);
  const width = columns.reduce((sum, column) => sum + column.width, 0);
  const [content, setContent] = useState(0);
  const overflows = room > 0 && content > room;
  const reach = overflows
    ? ({ tabIndex: 0, role: 'region', 'aria-label': `${label}, scrolls sideways` } as object)
    : {};
  return (
    <ScrollView
      horizontal
      {...reach}
      onLayout={({ nativeEvent }) => setRoom(nativeEvent.layout.width)}
      onContentSizeChange={setContent}
      contentContainerStyle={{ minWidth: '100%' }}
      style={{ maxWidth: '100%' }}
    >
      <View
        role="table"
        aria-label={label}
        style={{ width: room > 0 ? Math.max(room, width) : '100%', minWidth: width }}
      >
        <View role="rowgroup">
          <View
            role="row"
            style={{ flexDirection: 'row', borderBottomWidth: 1, borderBottomColor: tokens.outline }}
          >
            {columns.map((column, index) => (
              <Cell key={column.key} column={column} role="columnheader" pinned={index === 0} on={on}>
                <Words size="small" tone="quiet" weight="medium" align={column.align}>
                  {column.title}
                </Words>
                {column.note && (
                  <Words size="small" tone="quiet" align={column.align}>
                    {column.note}
                  </Words>
                )}
              </Cell>
            ))}
          </View>
        </View>
        <View role="rowgroup">
          {rows.map((row) => (
            <View
              key={row.key}
              role="row"
              style={{ flexDirection: 'row', borderBottomWidth: 1, borderBottomColor: tokens.hairline }}
            >
              {columns.map((column, index) => (
                <Cell
                  key={column.key}
                  column={column}
                  role={index === 0 ? 'rowheader' : 'cell'}
                  pinned={index === 0}
                  on={on}
                >
                  <CellContent
                    content={row.cells[index]}
                    align={column.align}
                    isStrong={row.isStrong === true || index === 0}
                  />
                </Cell>
              ))}
            </View>
          ))}
        </View>
      </View>
    </ScrollView>
  );
}

function CellContent(props: { content: ReactNode; align?: 'left' | 'right'; isStrong: boolean }) {
  const { content, align, isStrong } = props;
  if (typeof content !== 'string' && typeof content !== 'number') return content;
  return (
    <Words tabular align={align} weight={isStrong ? 'medium' : 'regular'}>
      {content}
    </Words>
  );
}

interface CellProps {
  column: Column;
  role: 'columnheader' | 'rowheader' | 'cell';
  pinned: boolean;
  on: 'paper' | 'surface';
  children: ReactNode;
}

function Cell({ column, role, pinned, on, children }: CellProps) {
  const tokens = useTokens();
  return (
    <View
      role={role}
      style={[
        {
          flexGrow: 1,
          flexShrink: 0,
          flexBasis: column.width,
          minWidth: 0,
          paddingVertical: SPACE.one,
          paddingRight: SPACE.one,
          paddingLeft: pinned ? 0 : SPACE.half,
          justifyContent: role === 'columnheader' ? 'flex-end' : 'flex-start',
        },
        pinned && {
          position: 'sticky' as 'relative',
          left: 0,
          zIndex: 1,
          backgroundColor: tokens[on],
        },
      ]}
    >
      {children}
    </View>
  );
}
