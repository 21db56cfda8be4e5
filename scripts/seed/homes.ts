import { J2X10, J2X6_HALL, J2X6_NO_STAMP, J2X6_SHORT, J2X8, NOTCHED, openAttic, TRUSSED, type DemoMark, type DemoProperty } from './scenario'

const room = (name: string, lengthFt: number, widthFt: number) => ({ name, lengthFt, widthFt })
const bedroom = (name: string, lengthFt: number, widthFt: number) => ({ name, lengthFt, widthFt, isBedroom: true as const })

const crack = (mark: Partial<DemoMark> & Pick<DemoMark, 'room' | 'pattern' | 'startMm'>): DemoMark => ({
  kind: 'crack', shape: 'wandering-line', place: 'middle', readings: 13, sinceDaysAgo: 390, lastDaysAgo: 6, ...mark,
})

/** Six invented properties with fourteen units, ten attics in every state, twenty-five marks in every state. */
export const PROPERTIES: DemoProperty[] = [
  {
    name: '14 Tern Street', addressLines: ['14 Tern Street', 'Quillbrook, Example State'], yearBuilt: 1954,
    units: [
      {
        name: 'upper flat', finish: 'plaster-on-lath', tenant: 'tomas', tenantName: 'Tomas Ilves', rooms: [bedroom('Bedroom', 14, 12), room('Hall', 8, 5), room('Living room', 18, 14)],
        attic: {
          name: 'Attic over the flat', surveyAgainDaysAgo: 95, survey: openAttic([J2X8], { ceilingFinish: 'plaster-on-lath' }), confirmedDaysAgo: 40,
          items: [
            { find: 'Carton of books', quantity: 12, xFt: 3.3, yFt: 9, daysAgo: 270 },
            { find: 'Tool chest', quantity: 1, xFt: 0, yFt: 2, daysAgo: 300, weighedLb: 140 },
            { find: 'Medium carton', quantity: 4, xFt: 4, yFt: 4, daysAgo: 330 },
            { find: 'Suitcase', quantity: 2, xFt: 0, yFt: 6, daysAgo: 320, weighedLb: 34, removedDaysAgo: 140 },
            { find: 'Artificial tree 7.5', quantity: 1, xFt: 0, yFt: 13, daysAgo: 350, weighedLb: 61 },
          ],
        },
        marks: [
          crack({ room: 2, pattern: 'fast', startMm: 0.8, sinceDaysAgo: 380 }),
          crack({ room: 0, pattern: 'still', startMm: 0.4, shape: 'straight-line' }),
          { room: 1, kind: 'nail-pops', shape: 'bumps-in-a-row', place: 'middle', startMm: 3, pattern: 'slow', readings: 7, sinceDaysAgo: 200, lastDaysAgo: 12 },
        ],
      },
      {
        name: 'ground floor', tenantName: 'Lotte Brandwijk', rooms: [room('Living room', 18, 14), bedroom('Bedroom', 14, 12), room('Kitchen', 10, 10)],
        marks: [crack({ room: 0, pattern: 'season', startMm: 0.6, shape: 'gap-along-wall', place: 'wall-ceiling-corner' }), crack({ room: 2, pattern: 'still', startMm: 0.3, readings: 4, sinceDaysAgo: 80 })],
      },
    ],
  },
  {
    name: '8 Ferry Lane', addressLines: ['8 Ferry Lane', 'Quillbrook, Example State'], yearBuilt: 1971,
    units: [{
      name: 'whole house', tenant: 'wanda', tenantName: 'Wanda Okonjo', rooms: [room('Stairs', 10, 6), bedroom('Front bedroom', 13, 12), bedroom('Back bedroom', 11, 10), room('Living room', 16, 13)],
      attic: { name: 'Attic', surveyAgainDaysAgo: 150, survey: openAttic([J2X6_SHORT]), confirmedDaysAgo: 200, items: [{ find: 'Large carton', quantity: 6, xFt: 0, yFt: 3, daysAgo: 360, tenantOwns: true }] },
      marks: [
        { room: 0, kind: 'sag', shape: 'shallow-dish', place: 'middle', startMm: 14, pattern: 'jump', readings: 3, sinceDaysAgo: 25, lastDaysAgo: 0, danger: true },
        crack({ room: 1, pattern: 'slow', startMm: 0.5 }),
        { room: 2, kind: 'stain', shape: 'ring', place: 'light-or-vent', startMm: 180, pattern: 'still', readings: 3, sinceDaysAgo: 60, lastDaysAgo: 9, stain: 'damp' },
      ],
    }],
  },
  {
    name: 'Millpond Cottage', addressLines: ['Millpond Road 2', 'Reedham Falls, Example State'], yearBuilt: 1926,
    units: [{
      name: 'cottage', engineer: 'ines', finish: 'plaster-on-lath', tenant: 'ruben', tenantName: 'Ruben Achterberg', rooms: [room('Parlour', 15, 14), bedroom('Loft room', 12, 11)],
      attic: {
        name: 'Roof space', survey: openAttic([NOTCHED], { conditions: ['notched'], ceilingFinish: 'plaster-on-lath' }), confirmedDaysAgo: 420,
        items: [{ find: 'Suitcase', quantity: 4, xFt: 2, yFt: 2, daysAgo: 500 }, { find: 'Small carton', quantity: 8, xFt: 5, yFt: 5, daysAgo: 470 }],
      },
      marks: [
        crack({ room: 0, pattern: 'season', startMm: 1.2, shape: 'web-of-lines' }),
        crack({ room: 1, pattern: 'still', startMm: 0.7, repairedDaysAgo: 120, shape: 'straight-line' }),
      ],
    }],
  },
  {
    name: '3 Quay Row', addressLines: ['3 Quay Row', 'Quillbrook, Example State'], yearBuilt: 1998,
    units: [
      {
        name: '1', tenantName: 'Anselm Vogt', rooms: [room('Living room', 15, 12), bedroom('Bedroom', 11, 10)],
        attic: {
          name: 'Storage attic 1', surveyAgainDaysAgo: 80, confirmedDaysAgo: 90,
          survey: openAttic([{ ...J2X10, layout: { leftFt: 0, frontFt: 0, joistsRun: 'left-right' } }, J2X6_HALL]),
          items: [{ find: 'Artificial tree 7.5', quantity: 1, xFt: 0, yFt: 1, daysAgo: 340 }, { find: 'Suitcase', quantity: 3, field: 2, xFt: 3, yFt: 3, daysAgo: 85 }],
        },
        marks: [crack({ room: 0, pattern: 'still', startMm: 0.2, shape: 'straight-line' })],
      },
      {
        name: '2', tenant: 'ilse', tenantName: 'Ilse Marchetti', rooms: [room('Living room', 15, 12), bedroom('Bedroom', 11, 10)],
        attic: { name: 'Storage attic 2', surveyAgainDaysAgo: 110, survey: openAttic([J2X10]), confirmedDaysAgo: 30, items: [] },
        marks: [crack({ room: 0, pattern: 'slow', startMm: 1.6, repairedDaysAgo: 45, readings: 12 }), crack({ room: 1, pattern: 'still', startMm: 0.4, lastDaysAgo: 70 })],
      },
      {
        name: '3', tenantName: 'Vacant since last month', rooms: [room('Living room', 15, 12)], marks: [crack({ room: 0, pattern: 'season', startMm: 0.9 })],
      },
      {
        name: '5', tenantName: 'Dagny Holm', rooms: [room('Living room', 16, 12), bedroom('Bedroom', 12, 10)],
        attic: { name: 'Storage attic 5', surveyAgainDaysAgo: 140, survey: openAttic([J2X6_SHORT]), confirmedDaysAgo: 60, items: [{ find: 'Carton of books', quantity: 10, xFt: 0, yFt: 8.5, daysAgo: 22 }, { find: 'Large carton', quantity: 27, xFt: 0, yFt: 0, daysAgo: 200 }] },
        marks: [crack({ room: 0, pattern: 'slow', startMm: 0.3, readings: 3, sinceDaysAgo: 18, lastDaysAgo: 4 })],
      },
    ],
  },
  {
    name: 'Sparrow Court', addressLines: ['40 Sparrow Court', 'Reedham Falls, Example State'], yearBuilt: 1985,
    units: [
      {
        name: 'A', tenantName: 'Joren Pell', rooms: [room('Living room', 17, 13), bedroom('Bedroom', 12, 12)],
        attic: { name: 'Attic A', surveyAgainDaysAgo: 170, survey: TRUSSED, items: [{ find: 'Medium carton', quantity: 3, xFt: 1, yFt: 1, daysAgo: 150, tenantOwns: true }] },
        marks: [crack({ room: 0, pattern: 'season', startMm: 1.5, shape: 'gap-along-wall', place: 'wall-ceiling-corner' })],
      },
      {
        name: 'B', tenantName: 'Sunniva Ask', rooms: [room('Living room', 17, 13), bedroom('Bedroom', 12, 12)],
        attic: { name: 'Attic B', surveyAgainDaysAgo: 160, survey: TRUSSED, items: [] },
        marks: [crack({ room: 1, pattern: 'season', startMm: 1.1, shape: 'gap-along-wall', place: 'wall-ceiling-corner' }), crack({ room: 0, pattern: 'still', startMm: 0.5, readings: 2, sinceDaysAgo: 20 })],
      },
      { name: 'C', tenantName: 'Halvor Reyes', rooms: [room('Living room', 17, 13)], marks: [crack({ room: 0, pattern: 'still', startMm: 0.3 }), crack({ room: 0, pattern: 'season', startMm: 0.8, shape: 'straight-line' })] },
    ],
  },
  {
    name: '27 Larkfield', addressLines: ['27 Larkfield Avenue', 'Quillbrook, Example State'], yearBuilt: 1962,
    units: [
      {
        name: 'front', tenantName: 'Noor Castellan', rooms: [room('Living room', 16, 14), bedroom('Bedroom', 13, 11)],
        attic: { name: 'Front attic', survey: null, items: [{ find: 'Suitcase', quantity: 3, xFt: 2, yFt: 2, daysAgo: 100 }] },
        marks: [crack({ room: 0, pattern: 'still', startMm: 0.6 }), { room: 1, kind: 'nail-pops', shape: 'scattered-bumps', place: 'middle', startMm: 2, pattern: 'still', readings: 6, sinceDaysAgo: 220, lastDaysAgo: 30 }],
      },
      {
        name: 'rear', tenantName: 'Emrik Dahl', rooms: [room('Living room', 14, 12), bedroom('Bedroom', 12, 10)],
        attic: { name: 'Rear attic', survey: openAttic([J2X6_NO_STAMP], { access: 'hatch', openingWidthIn: 22, openingLengthIn: 30 }), confirmedDaysAgo: 300, items: [{ find: 'Small carton', quantity: 3, xFt: 0, yFt: 2, daysAgo: 260 }, { find: 'Tool chest', quantity: 1, xFt: 0, yFt: 5, daysAgo: 330, weighedLb: 120 }] },
        marks: [{ room: 0, kind: 'stain', shape: 'patch', place: 'middle', startMm: 240, pattern: 'still', readings: 5, sinceDaysAgo: 240, lastDaysAgo: 40, stain: 'dry' }, crack({ room: 1, pattern: 'still', startMm: 0.4 })],
      },
      { name: 'garden room', tenantName: 'Vacant', rooms: [room('Garden room', 14, 12)], marks: [crack({ room: 0, pattern: 'still', startMm: 0.5, readings: 6, sinceDaysAgo: 190, lastDaysAgo: 100 })] },
    ],
  },
]
