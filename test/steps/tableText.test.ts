import { describe, expect, it } from 'vitest'
import { isBlock, pasted, readBlock } from '../../app/ui/tableText.ts'

describe('cells from a spreadsheet', () => {
  it('tabs part cells, lines part rows, empty lines go', () => {
    expect(readBlock('a\t 1 \r\nb\t2\r\n\r\n')).toEqual([
      ['a', '1'],
      ['b', '2'],
    ])
  })
  it('quoted cells hold tabs, line ends and quotes', () => {
    expect(readBlock('"two\nlines"\t"say ""so"""\nx\ty')).toEqual([
      ['two\nlines', 'say "so"'],
      ['x', 'y'],
    ])
  })
  it('one cell with the line end a spreadsheet adds is no block', () => {
    expect(isBlock('12.5\n')).toBe(false)
    expect(isBlock('12.5\t3')).toBe(true)
  })
  const rows = [
    ['A', '1', '2'],
    ['B', '3', '4'],
  ]
  const heads = ['Name', 'From', 'To']
  it('goes from the cell in hand on, adds rows, and leaves out what lies right of the last column', () => {
    expect(
      pasted(
        rows,
        [
          ['7', '8', '9'],
          ['5', '6'],
        ],
        1,
        1,
        heads,
      ),
    ).toEqual([
      ['A', '1', '2'],
      ['B', '7', '8'],
      ['', '5', '6'],
    ])
  })
  it('a first line with the names of columns says where the cells go', () => {
    expect(
      pasted(
        rows,
        [
          ['to (NM)', 'name'],
          ['40', 'C'],
        ],
        2,
        1,
        heads,
      ),
    ).toEqual([...rows, ['C', '', '40']])
  })
  it('a column is known by its name in a file too', () => {
    const block = [
      ['lat', 'name'],
      ['48', 'P1'],
    ]
    expect(
      pasted([], block, 0, 0, [
        ['Name', 'name'],
        ['Latitude', 'lat'],
        ['Note', ''],
      ]),
    ).toEqual([['P1', '48', '']])
  })
})
