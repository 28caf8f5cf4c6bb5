import type { Project } from '../project/project.ts'
import type { Evaluation } from '../results.ts'
import { inputChecksum } from './checksum.ts'
import type { Report, ReportSection } from './report.ts'
import { absorberSection } from './sections/absorber-sheet.ts'
import { cautionSection, checksumSection } from './sections/cautions.ts'
import { figureSection } from './sections/figures.ts'
import { machineInputs } from './sections/inputs-machine.ts'
import { mountingInputs } from './sections/inputs-mounting.ts'
import { runUpInputs } from './sections/inputs-run-up.ts'
import { requirementInputs } from './sections/inputs-requirements.ts'
import { jobSection, titleBlock } from './sections/job.ts'
import { methodSection } from './sections/methods.ts'
import { mountScheduleSection } from './sections/mount-schedule.ts'
import { modeBlocks } from './sections/results-modes.ts'
import { responseBlocks } from './sections/results-response.ts'
import { runUpBlocks } from './sections/results-run-up.ts'
import { mountResults } from './sections/results-mounts.ts'
import { massBlocks, problemBlocks, staticBlocks } from './sections/results-static.ts'
import { verdictSection } from './sections/verdicts.ts'
import { writerFor } from './writer.ts'

export interface ReportOptions {
  /** when the report is made, as it shall stand in the title block, such as '2031-05-04' */
  readonly madeAt?: string
}

/**
 * The calculation report as data, in the project's units. The same project, evaluation and date
 * give the same report.
 * @param evaluation of this very project
 */
export function buildReport(project: Project, evaluation: Evaluation, options: ReportOptions = {}): Report {
  const writer = writerFor(project.units)
  const checksum = inputChecksum(project)
  const madeAt = options.madeAt ?? null
  const inputs: ReportSection = {
    id: 'inputs',
    heading: 'Inputs',
    blocks: [
      ...machineInputs(project, evaluation, writer),
      ...mountingInputs(project, writer),
      ...runUpInputs(project, writer),
      ...requirementInputs(project, writer),
    ],
  }
  const results: ReportSection = {
    id: 'results',
    heading: 'Results',
    blocks: [
      ...problemBlocks(evaluation, writer),
      { kind: 'heading', text: 'Mass' },
      ...massBlocks(evaluation, writer),
      { kind: 'heading', text: 'At rest' },
      ...staticBlocks(project, evaluation, writer),
      ...mountResults(project, evaluation, writer),
      { kind: 'heading', text: 'Natural modes' },
      ...modeBlocks(evaluation, writer),
      { kind: 'heading', text: 'Response' },
      ...responseBlocks(project, evaluation, writer),
      ...runUpBlocks(project, evaluation, writer),
    ],
  }
  const absorbers = absorberSection(project, evaluation, writer)
  return {
    title: project.job.name || 'Unnamed project',
    titleBlock: titleBlock(project, evaluation, madeAt, checksum),
    madeAt,
    checksum,
    units: project.units,
    paper: project.units === 'US' ? 'Letter' : 'A4',
    sections: [
      jobSection(project, evaluation, writer),
      verdictSection(project, evaluation, writer),
      inputs,
      results,
      figureSection(project, evaluation, writer),
      mountScheduleSection(project, evaluation, writer),
      ...(absorbers ? [absorbers] : []),
      methodSection(project),
      cautionSection(project),
      checksumSection(checksum),
    ],
  }
}
