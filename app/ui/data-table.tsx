"use client"

import {
  columnFilteringFeature,
  createFilteredRowModel,
  createPaginatedRowModel,
  createSortedRowModel,
  filterFn_includesString,
  globalFilteringFeature,
  rowPaginationFeature,
  rowSortingFeature,
  sortFn_alphanumeric,
  sortFn_basic,
  tableFeatures,
  useTable,
} from "@tanstack/react-table"
import { type ReactNode, useMemo } from "react"
import { type CsvValue, csvOf } from "@/lib/csv"
import { Button } from "./button"
import { classNames } from "./class-names"
import { download } from "./download"
import { DownMark, UpMark } from "./marks"

const features = tableFeatures({
  columnFilteringFeature,
  globalFilteringFeature,
  rowSortingFeature,
  rowPaginationFeature,
  filteredRowModel: createFilteredRowModel(),
  sortedRowModel: createSortedRowModel(),
  paginatedRowModel: createPaginatedRowModel(),
  filterFns: { includesString: filterFn_includesString },
  sortFns: { alphanumeric: sortFn_alphanumeric, basic: sortFn_basic },
})

/** A column: what it is sorted, filtered and exported by, and how it is shown. */
export interface Column<Row> {
  readonly id: string
  readonly header: string
  value(row: Row): CsvValue
  cell?(row: Row): ReactNode
  /** Numbers stand to the right. */
  readonly numeric?: boolean
}

const pageSize = 25

/** A list that sorts, filters, pages and, with a `fileName`, exports. `actions` stand at the end of each row. */
export function DataTable<Row extends { readonly id: string }>({
  caption,
  columns,
  rows,
  actions,
  fileName,
  toolbar,
  empty,
  sortedBy,
  stacked = false,
}: {
  caption: string
  columns: readonly Column<Row>[]
  rows: readonly Row[]
  actions?: (row: Row) => ReactNode
  fileName?: string
  toolbar?: ReactNode
  empty: ReactNode
  sortedBy?: { id: string; desc: boolean }
  /** On a phone each row stands as a block of lines, each with its column's name, in place of a table that scrolls. */
  stacked?: boolean
}) {
  const definitions = useMemo(
    () =>
      columns.map((column) => ({
        id: column.id,
        header: column.header,
        accessorFn: (row: Row) => column.value(row),
        sortFn: column.numeric ? ("basic" as const) : ("alphanumeric" as const),
      })),
    [columns],
  )
  const data = useMemo(() => [...rows], [rows])
  const table = useTable({
    features,
    columns: definitions,
    data,
    getRowId: (row: Row) => row.id,
    globalFilterFn: "includesString",
    initialState: { pagination: { pageIndex: 0, pageSize }, sorting: sortedBy ? [sortedBy] : [] },
  })
  const shown = table.getRowModel().rows
  const matching = table.getFilteredRowModel().rows.length
  const pages = table.getPageCount()
  const page = table.state.pagination.pageIndex

  function save(fileName: string) {
    const sorted = table
      .getSortedRowModel()
      .rows.map(({ original }) => columns.map((column) => column.value(original)))
    const header = columns.map(({ header }) => header)
    download(`${fileName}.csv`, csvOf(header, sorted))
  }

  return (
    <div>
      <div
        className={classNames(
          "mb-3 flex flex-wrap items-end justify-between gap-3",
          !toolbar && rows.length === 0 && "hidden",
        )}
      >
        <div className="flex flex-wrap items-end gap-3">
          <input
            type="search"
            aria-label={`Filter: ${caption}`}
            placeholder="Filter"
            value={table.state.globalFilter ?? ""}
            onChange={(event) => table.setGlobalFilter(event.target.value)}
            className="min-h-8 w-48 rounded border border-edge bg-field px-3 text-sm placeholder:text-soft"
          />
          {toolbar}
        </div>
        {fileName && (
          <Button look="quiet" small onClick={() => save(fileName)} disabled={matching === 0}>
            Export CSV
          </Button>
        )}
      </div>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard */}
      <section aria-label={caption} tabIndex={0} className="relative overflow-x-auto border-y border-line">
        <table className="w-full text-left text-sm">
          <caption className="sr-only">{caption}</caption>
          <thead className={classNames(stacked && "max-sm:hidden")}>
            <tr>
              {table.getFlatHeaders().map((header, index) => {
                const sorted = header.column.getIsSorted()
                const SortMark = sorted === "desc" ? DownMark : UpMark
                return (
                  <th
                    key={header.id}
                    scope="col"
                    aria-sort={sorted === "asc" ? "ascending" : sorted === "desc" ? "descending" : undefined}
                    className={classNames("py-2 pr-6 font-medium", columns[index]?.numeric && "text-right")}
                  >
                    <button
                      type="button"
                      onClick={header.column.getToggleSortingHandler()}
                      className={classNames(
                        "inline-flex items-center gap-1 text-soft hover:text-ink",
                        columns[index]?.numeric && "flex-row-reverse",
                      )}
                    >
                      {columns[index]?.header}
                      <SortMark className={classNames("size-3", !sorted && "invisible")} />
                    </button>
                  </th>
                )
              })}
              {actions && (
                <th scope="col">
                  <span className="sr-only">Actions</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {shown.map(({ id, original }) => (
              <tr
                key={id}
                className={classNames(
                  "border-t border-line align-top",
                  stacked && "max-sm:block max-sm:py-3 max-sm:first:border-t-0",
                )}
              >
                {columns.map((column) => (
                  <td
                    key={column.id}
                    className={classNames(
                      "py-2.5 pr-6",
                      column.numeric && "text-right font-mono text-[0.8125rem]",
                      stacked && "max-sm:flex max-sm:gap-3 max-sm:py-1 max-sm:pr-0 max-sm:text-left",
                    )}
                  >
                    {stacked && (
                      <span
                        aria-hidden="true"
                        className="w-20 shrink-0 font-sans text-sm text-soft sm:hidden"
                      >
                        {column.header}
                      </span>
                    )}
                    {column.cell ? column.cell(original) : column.value(original)}
                  </td>
                ))}
                {actions && (
                  <td
                    className={classNames(
                      "py-1.5 text-right whitespace-nowrap",
                      stacked && "max-sm:block max-sm:text-left",
                    )}
                  >
                    {actions(original)}
                  </td>
                )}
              </tr>
            ))}
          </tbody>
        </table>
        {shown.length === 0 && (
          <div className="border-t border-line py-6 text-sm text-soft">
            {rows.length === 0 ? empty : "Nothing matches the filter."}
          </div>
        )}
      </section>
      {pages > 1 && (
        <nav
          aria-label={`Pages: ${caption}`}
          className="mt-3 flex items-center justify-end gap-3 text-sm text-soft"
        >
          <span aria-live="polite">
            {matching.toLocaleString("en")} rows, page {page + 1} of {pages}
          </span>
          <Button small disabled={!table.getCanPreviousPage()} onClick={() => table.previousPage()}>
            Earlier page
          </Button>
          <Button small disabled={!table.getCanNextPage()} onClick={() => table.nextPage()}>
            Next page
          </Button>
        </nav>
      )}
    </div>
  )
}
