import { describe, expect, it } from 'vitest'
import { automaticLabels, dealLabels, letterLabel, numberLabel, seriesOf } from '~~/app/utils/plate/labels'

describe('labels of grid lines', () => {
  it('skips I and O and goes on with two letters after Z', () => {
    const labels = Array.from({ length: 26 }, (_, i) => letterLabel(i))
    expect(labels.join(' ')).toBe('A B C D E F G H J K L M N P Q R S T U V W X Y Z AA AB')
    expect(numberLabel(0)).toBe('1')
  })

  it('reads the series off the first label', () => {
    expect(seriesOf(['C', 'D'], 'x')).toEqual({ kind: 'letters', start: 2 })
    expect(seriesOf(['AA'], 'y')).toEqual({ kind: 'letters', start: 24 })
    expect(seriesOf(['11'], 'y')).toEqual({ kind: 'numbers', start: 10 })
    expect(seriesOf(['N1'], 'x')).toEqual({ kind: 'numbers', start: 0 })
    expect(seriesOf(['N1'], 'y')).toEqual({ kind: 'letters', start: 0 })
  })

  it('tells typed labels from those of the series, also after one in between', () => {
    expect(automaticLabels(['1', '2', '2a', '3'], { kind: 'numbers', start: 0 })).toEqual([true, true, false, true])
  })

  it('never gives a typed label a second time', () => {
    expect(dealLabels([null, '3', null, null], { kind: 'numbers', start: 0 })).toEqual(['1', '3', '2', '4'])
  })
})
