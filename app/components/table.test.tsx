import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { Table } from './table.tsx';

afterEach(cleanup);
const rows = [
  { name: 'west pan', year: 2028 },
  { name: 'east pan', year: 2027 },
];

describe('Table', () => {
  it('has a name, heads for its columns and marks the selected row', () => {
    render(
      <Table
        caption="Works"
        columns={[
          { key: 'name', head: 'Works', cell: ({ name }) => name },
          { key: 'year', head: 'year', number: true, cell: ({ year }) => year },
        ]}
        rows={rows}
        rowKey={({ name }) => name}
        selected={({ name }) => name === 'west pan'}
      />,
    );
    expect(screen.getByRole('table', { name: 'Works' })).toBeTruthy();
    expect(screen.getAllByRole('columnheader').map((head) => head.textContent)).toEqual(['Works', 'year']);
    const body = screen.getAllByRole('row').slice(1);
    expect(body.map((row) => row.textContent)).toEqual(['west pan2028', 'east pan2027']);
    expect(body.map((row) => row.getAttribute('aria-selected'))).toEqual(['true', 'false']);
  });
});
