/** The words of framing, for people who have never been in an attic. Facts carry their source; the rest is common practice. */

export const ROOF_TOPICS = [
  'framing', 'clear-height', 'opening', 'bearing-wall', 'spacing', 'span', 'depth', 'bearing-length', 'stamp', 'top-edge', 'deck', 'strongback', 'notch', 'hole',
] as const
export type RoofTopic = typeof ROOF_TOPICS[number]

export interface RoofWords {
  title: string
  /** The link beside a field of the survey. */
  ask: string
  /** What the drawing shows, for those who do not see it. */
  drawing: string
  paragraphs: readonly string[]
  notSure: string
  source: string
}

const PRACTICE = 'Common practice, no published source.'

export const ROOF_WORDS: Record<RoofTopic, RoofWords> = {
  'framing': {
    title: 'Truss or rafter', ask: 'How to tell a truss from a rafter',
    drawing: 'Two roofs cut open. One is empty between sloping rafters and level joists. In the other, thinner pieces cross the space, with a metal plate at each meeting point.',
    paragraphs: [
      'Rafters are sloping boards that meet at the ridge. Ceiling joists are the level boards on the walls below. The space between them is open.',
      'A truss is one factory-made frame. Thinner pieces, called webs, cross the space, and flat metal plates with teeth hold every meeting point. If you see one such plate, it is a truss.',
      'Never cut, notch or move any piece of a truss. Each piece holds the others.',
    ],
    notSure: 'Not sure counts as a truss: nothing may be stored.', source: PRACTICE,
  },
  'clear-height': {
    title: 'Clear height', ask: 'How to measure the clear height',
    drawing: 'A roof cut open, with a measure upright from the top of the joists to the underside of the rafters at the highest place.',
    paragraphs: ['Measure straight up from the top of the joists to the underside of the rafters where it is highest. From 42 in on, the code may count the space as storage; 42 in itself counts.'],
    notSure: 'Not measured: the code then counts no storage, and nothing may be stored.', source: 'IRC 2018 and 2021, Table R301.5, notes b and g.',
  },
  'opening': {
    title: 'Opening', ask: 'How to measure the opening',
    drawing: 'The opening seen from below between two joists, with a measure along each side.',
    paragraphs: ['Measure the clear hole, from edge to edge of its frame, not the lid. At 20 by 30 in or more the code may count the attic as storage; which side is which does not matter.'],
    notSure: 'Not measured: the code then counts no storage, and nothing may be stored.', source: 'IRC 2018 and 2021, Table R301.5, note b.',
  },
  'bearing-wall': {
    title: 'Bearing wall', ask: 'How to tell a bearing wall',
    drawing: 'A joist that rests on an outer wall at the left and on an inner wall at the right. Both walls go on down to the ground. A thin partition between them stops short of the joist.',
    paragraphs: [
      'A bearing wall carries the joists down to the foundation. Outer walls under the ends of the joists nearly always do. An inner wall does when joists end, lap or meet on it and another wall or a beam stands under it below.',
      'A partition only divides rooms. Joists run over it without a joint, or along it. It may touch them and still carry nothing.',
      'A joist that goes on over a bearing wall is entered as two groups, one for each side.',
    ],
    notSure: 'Not sure: the span may be longer than it looks, so at most 10 psf is taken.', source: `${PRACTICE} The 10 psf is ours.`,
  },
  'spacing': {
    title: 'Spacing', ask: 'How to measure the spacing',
    drawing: 'Three joists seen from their ends, with a measure from the middle of the first to the middle of the second.',
    paragraphs: ['Measure from the middle of one joist to the middle of the next. Easier: from the left face of one to the left face of the next, which is the same. Measure over four gaps and divide by four. Usual are 12, 16, 19.2 and 24 in.'],
    notSure: 'Not measured: the joists are not calculated, and at most 10 psf is taken.', source: `${PRACTICE} The 10 psf is ours.`,
  },
  'span': {
    title: 'Clear span', ask: 'How to measure the clear span',
    drawing: 'A joist on two walls, with a measure from the inner face of one wall to the inner face of the other.',
    paragraphs: ['Measure below, in the room, from the inner face of one bearing wall to the inner face of the next, in the direction of the joists. It is not the length of the board. If several rooms lie under the joists, measure from bearing wall to bearing wall. Take the longest span of the group.'],
    notSure: 'Not measured: the joists are not calculated, and at most 10 psf is taken. A span entered too short makes the attic look stronger than it is.', source: `${PRACTICE} The 10 psf is ours.`,
  },
  'depth': {
    title: 'Size of a joist', ask: 'How to measure a joist',
    drawing: 'The cut end of a joist with a measure along its depth, upright, and one along its thickness.',
    paragraphs: [
      'Measure the depth upright and the thickness across. A planed 2x4 measures 1½ by 3½ in, 2x6 1½ by 5½, 2x8 1½ by 7¼, 2x10 1½ by 9¼, 2x12 1½ by 11¼ in.',
      'Older and rough-sawn wood is larger and uneven. Choose “another size” then, and enter the smallest you measure. Where insulation hides the wood, measure at the hatch.',
    ],
    notSure: 'Not measured: at most 10 psf is taken, and near the walls the smallest and weakest common joist.', source: 'NDS 2018 Supplement, Table 1B (dressed sizes). The 10 psf is ours.',
  },
  'bearing-length': {
    title: 'Bearing length', ask: 'How to measure the bearing length',
    drawing: 'The end of a joist on the top of a wall, with a measure along the wood that rests on it.',
    paragraphs: ['How much of the joist’s end rests on the wall. The code asks at least 1½ in on wood or metal and 3 in on masonry.'],
    notSure: 'Not measured: 1½ in is taken.', source: 'IRC 2018 R502.6.',
  },
  'stamp': {
    title: 'Grade stamp', ask: 'What a grade stamp says',
    drawing: 'A joist with an ink stamp on its side. Arrows point at the letters of the wood and at the grade.',
    paragraphs: [
      'Many boards carry an ink stamp every few feet. It names the kind of wood (SPF, DF or D FIR-L, HF, SP or SYP), the grade (SEL STR, No. 1, No. 2, No. 3), and how dry it was (S-DRY, KD, S-GRN).',
      'Look at several joists and enter the lowest grade. Enter a grade only as you read it, or as an inspector or engineer recorded it.',
      'Southern pine got lower values in June 2013. Older wood has the higher ones only when a stamp and a dated paper prove its age.',
    ],
    notSure: 'No stamp: spruce-pine-fir No. 3 is taken, the weakest usual pair.', source: 'Values: NDS 2018 Supplement, Tables 4A and 4B. Taking No. 3 is ours.',
  },
  'top-edge': {
    title: 'Top edge held', ask: 'What holds the top edge',
    drawing: 'Joists seen from their ends. Above the first pair lies a deck; between the second pair stands a block as deep as they are.',
    paragraphs: ['A tall thin board tips over under load unless something holds its top edge: boards nailed down on it, or blocks tight between the joists. It matters for 2x10 and deeper.'],
    notSure: 'Not sure: it counts as held only where boards lie all over. Otherwise deeper joists take less.', source: 'NDS 2018, 3.3.3 and 4.4.1.',
  },
  'deck': {
    title: 'Deck', ask: 'What counts as a deck',
    drawing: 'Boards laid across several joists.',
    paragraphs: ['Boards or panels fastened across the joists, to walk and store on. Boards that lie loose, or span only one gap, are no deck. Nothing may rest on the ceiling board between joists.'],
    notSure: 'Not sure: its weight is counted, its help is not.', source: PRACTICE,
  },
  'strongback': {
    title: 'Strongback', ask: 'What a strongback is',
    drawing: 'A board on its edge, laid across the tops of five joists and fastened to each.',
    paragraphs: [
      'A board on edge that runs across the joists, usually in the middle of the span, fastened to every one of them. It makes neighbours share a load and sag together.',
      'A loose board, or one that misses some joists, is none.',
    ],
    notSure: 'It is shown beside the verdict and counts only when an engineer’s letter says so.', source: 'That it counts only with an engineer’s letter is ours, on the safe side.',
  },
  'notch': {
    title: 'Notch', ask: 'How to measure a notch',
    drawing: 'A joist from its side, marked in three equal parts, with a piece cut out of its top edge in the first part. A measure shows depth and length of the cut.',
    paragraphs: ['A notch is a piece cut out of the top or bottom edge, often for a pipe or wire. Allowed is at most a sixth of the depth, at most a third of the depth long, none in the middle third of the span, and a quarter of the depth at the ends.'],
    notSure: 'Not measured: the rating goes on hold until somebody has inspected it.', source: 'IRC 2018 R502.8.1 and R802.7.1.',
  },
  'hole': {
    title: 'Bored hole', ask: 'How to measure a hole',
    drawing: 'A joist from its side with a round hole. Measures show its width, and how far it is from the edge.',
    paragraphs: ['Allowed is a hole of at most a third of the depth, at least 2 in from the top and bottom edge and from any other hole or notch.'],
    notSure: 'Not measured: the rating goes on hold until somebody has inspected it.', source: 'IRC 2018 R502.8.1 and R802.7.1.',
  },
}
