import type { PaperContact, PaperSize } from '../../../shared/types/paper'
import { EMERGENCY_CALL, HANDS_OFF, LEAVE_ROOM, WATER_CAUTION } from '../../../shared/utils/messages/safety'
import type { FormBlock, FormPart } from '../../../shared/utils/papers/reportForm'
import { drawShape } from '../pdf/drawShape'
import { GRAPHITE, RULE, finishPaper, needRoom, openPaper, type Paper, type PaperOptions } from '../pdf/paper'
import type { PaperFonts } from '../pdf/paperFonts'
import { drawCautions, drawDivider, drawHead } from '../pdf/paperParts'
import { drawBox, drawRule, drawTickBox } from '../pdf/paperShapes'
import { drawText, writeText } from '../pdf/paperText'

export interface ReportForm { size: PaperSize, home: string, contact: PaperContact, blocks: FormBlock[], madeAt: Date }

const TEXT = { sizePt: 10.5 } as const
const LABEL = { sizePt: 10.5, weight: 600 } as const

/** The report to fill in by hand: danger signs and what to do about them first, then the same questions as on the phone. */
export async function reportFormPdf({ size, home, contact, blocks, madeAt }: ReportForm, fonts: PaperFonts): Promise<Buffer> {
  const options: PaperOptions = { size, fonts, title: `Report form, ${home}`, madeAt }
  const paper = openPaper(options)
  drawHead(paper, { kind: 'To fill in by hand', title: 'Something on a ceiling', place: home })
  blocks.forEach((block, index) => {
    needRoom(paper, heightOf(options, block, index + 1))
    drawBlock(paper, block, index + 1)
    if (block.question === 'danger') drawDangerAdvice(paper, contact)
  })
  drawOffice(paper)
  return finishPaper(paper, `Report form. Hand it to ${contact.organisationName}${contact.phone ? `, ${contact.phone}` : ''}. The day it is received counts as well as the day it was filled in.`)
}

/** Drawn once beside the sheet, so that no question is torn apart between two pages. */
function heightOf(options: PaperOptions, block: FormBlock, number: number): number {
  const trial = openPaper(options)
  drawBlock(trial, block, number)
  return trial.yPt - trial.topPt
}

function drawBlock(paper: Paper, { heading, lead, parts }: FormBlock, number: number) {
  drawDivider(paper, 5)
  writeText(paper, `${number}  ${heading}`, { sizePt: 12.5, weight: 800 }, 1)
  if (lead) writeText(paper, lead, { ...TEXT, colour: GRAPHITE }, 2)
  for (const part of parts) drawPart(paper, part)
  paper.yPt += 4
}

function drawDangerAdvice(paper: Paper, { organisationName, phone }: PaperContact) {
  const call = `Call ${organisationName}${phone ? `, ${phone}` : ''}. Do not wait for this sheet.`
  drawCautions(paper, [`${LEAVE_ROOM} ${call}`, WATER_CAUTION, EMERGENCY_CALL, HANDS_OFF], { heading: 'If you ticked any of these', urgent: true, sizePt: 11 })
}

function drawPart(paper: Paper, part: FormPart) {
  if ('label' in part && part.label) writeText(paper, part.label, LABEL, 1)
  switch (part.kind) {
    case 'ticks': return drawTicks(paper, part.choices, part.columns)
    case 'pictures': return drawPictures(paper, part.choices)
    case 'blanks': return drawBlanks(paper, part.labels)
    case 'sketch': return drawSketch(paper)
    case 'lines': return drawLines(paper, part.count)
  }
}

/** Row by row, so that the eye goes across as it does in reading. */
function drawTicks(paper: Paper, choices: readonly string[], columns: number) {
  const columnPt = paper.widthPt / columns
  for (let from = 0; from < choices.length; from += columns) {
    const ends = choices.slice(from, from + columns).map((choice, column) => {
      const x = paper.leftPt + column * columnPt
      drawTickBox(paper, x, paper.yPt + 2.5)
      return drawText(paper, choice, { xPt: x + 16, yPt: paper.yPt, widthPt: columnPt - 24 }, TEXT)
    })
    paper.yPt = Math.max(...ends) + 2
  }
  paper.yPt += 2
}

const PICTURE_PT = 54
const IN_A_ROW = 3

function drawPictures(paper: Paper, choices: Extract<FormPart, { kind: 'pictures' }>['choices']) {
  const columnPt = paper.widthPt / IN_A_ROW
  for (let from = 0; from < choices.length; from += IN_A_ROW) {
    const row = choices.slice(from, from + IN_A_ROW)
    const ends = row.map(({ label, shape }, column) => {
      const x = paper.leftPt + column * columnPt
      const heightPt = shape ? drawShape(paper, shape, x, paper.yPt, PICTURE_PT) : 0
      drawTickBox(paper, x + PICTURE_PT + 7, paper.yPt + 2.5)
      const end = drawText(paper, label, { xPt: x + PICTURE_PT + 22, yPt: paper.yPt, widthPt: columnPt - PICTURE_PT - 28 }, TEXT)
      return Math.max(paper.yPt + heightPt, end)
    })
    paper.yPt = Math.max(...ends) + 5
  }
}

function drawBlanks(paper: Paper, labels: readonly string[]) {
  const columnPt = paper.widthPt / labels.length
  labels.forEach((label, column) => {
    const x = paper.leftPt + column * columnPt
    drawText(paper, label, { xPt: x, yPt: paper.yPt + 4, widthPt: columnPt * 0.48 }, TEXT)
    paper.doc.moveTo(x + columnPt * 0.5, paper.yPt + 20).lineTo(x + columnPt - 8, paper.yPt + 20).lineWidth(0.8).stroke(GRAPHITE)
  })
  paper.yPt += labels.length > 1 ? 36 : 26
}

function drawSketch(paper: Paper) {
  const heightPt = 66
  drawBox(paper, { xPt: paper.leftPt, yPt: paper.yPt + 2, widthPt: paper.widthPt * 0.6, heightPt }, 1, RULE)
  paper.yPt += heightPt + 8
}

function drawLines(paper: Paper, count: number) {
  for (let line = 0; line < count; line += 1) {
    paper.yPt += 21
    drawRule(paper, paper.yPt)
  }
  paper.yPt += 6
}

/** For whoever enters the sheet later. */
function drawOffice(paper: Paper) {
  needRoom(paper, 46)
  drawDivider(paper, 4)
  writeText(paper, 'For the office', { ...LABEL, colour: GRAPHITE })
  drawBlanks(paper, ['Received on', 'Entered as report'])
}
