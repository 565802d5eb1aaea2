import { describe, expect, it } from 'vitest'
import { allowedAtFace, fieldText, readNumber, readNumbers, restText } from '../../app/ui/readNumber.ts'
import { limitOf } from '../../core/index.ts'

const GHZ = { unit: 'GHz', size: 1e9 }
const FT = { unit: 'ft', size: 0.3048 }
const frequency = limitOf('radar.frequencyHz')

describe('number fields', () => {
  it('show three or four digits of a converted value at rest, the whole value when worked on', () => {
    expect(fieldText(90, FT)).toBe('295.28')
    expect(restText(90, FT)).toBe('295')
    expect(restText(800, FT)).toBe('2625')
    expect(restText(30_000, { unit: 'NM', size: 1852 })).toBe('16.2')
    expect(restText(1852 * 1.125, { unit: 'NM', size: 1852 })).toBe('1.125')
    expect(restText(-90, FT)).toBe('−295')
    expect(restText(2.7512345e9, GHZ)).toBe(fieldText(2.7512345e9, GHZ))
    expect(restText(undefined, FT)).toBe('')
  })
  it('take face units, keep SI', () => {
    expect(readNumber('2.75', GHZ, frequency)).toEqual({ ok: true, value: 2.75e9 })
    expect(readNumber('1000', FT)).toEqual({ ok: true, value: 304.8 })
    expect(fieldText(304.8, FT)).toBe('1000')
  })
  it.each([
    ['2.75 GHz', 2.75e9],
    ['2,75', 2.75e9],
    [' 2.75 ', 2.75e9],
    ['0.1e1', 1e9],
  ])('read "%s"', (text, value) => expect(readNumber(text, GHZ, frequency)).toEqual({ ok: true, value }))
  it('read a true minus as it is shown', () => {
    expect(readNumber(fieldText(-28, { unit: 'dB', size: 1 }), { unit: 'dB', size: 1 })).toEqual({ ok: true, value: -28 })
  })
  it('empty is the default again', () => expect(readNumber('  ', GHZ, frequency)).toEqual({ ok: true, value: undefined }))
  it('say what is allowed, in face units', () => {
    expect(readNumber('50', GHZ, frequency)).toEqual({ ok: false, why: '50 GHz is outside; give from 0.03 to 40 GHz' })
    expect(readNumber('two', GHZ, frequency)).toEqual({ ok: false, why: '“two” is no number; give from 0.03 to 40 GHz' })
    expect(allowedAtFace(limitOf('needs[0].pd')!, { unit: '', size: 1 })).toBe('give above 0 and below 1')
  })
  it('refuse what can be read two ways', () => expect(readNumber('1,000', FT).ok).toBe(false))
  it('lists', () => {
    expect(readNumbers('8, 15; 24 32', { unit: 'm', size: 1 }, limitOf('candidates[0].mastHeightsM[0]'))).toEqual({
      ok: true,
      values: [8, 15, 24, 32],
    })
    expect(readNumbers('8, -5', { unit: 'm', size: 1 }, limitOf('candidates[0].mastHeightsM[0]')).ok).toBe(false)
  })
})
