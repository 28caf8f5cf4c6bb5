import { assertNever } from '../../errors.ts'
import type { AirDesign, ComponentDesign, PadDesign, SpringDesign } from '../../project/component-designs.ts'
import type { MountType } from '../../project/mounts.ts'
import type { Project } from '../../project/project.ts'
import { directionWords } from '../../excitation/describe.ts'
import { formatTemperature } from '../../units/temperature.ts'
import { nameOf } from '../names.ts'
import { column, textColumn, writeTable } from '../raw-table.ts'
import type { Block, Fact } from '../report.ts'
import type { Writer } from '../writer.ts'

/** By what a type of mount is described, in words. */
export function lawWords({ design, law }: MountType): string {
  if (design !== null) return `dimensions of ${COMPONENT_WORDS[design.component]}`
  return law.kind === 'curve' ? 'measured curve' : 'stiffness'
}

export const COMPONENT_WORDS: Readonly<Record<ComponentDesign['component'], string>> = {
  helicalSpring: 'a helical spring',
  rubberPad: 'a rubber pad',
  airSpring: 'an air spring',
}

/** Curves, components and temperatures of the mount types, as they were put in. */
export function lawInputs(project: Project, writer: Writer): readonly Block[] {
  return project.mounting.types.flatMap((type): readonly Block[] => [
    ...(type.design === null && type.law.kind === 'curve'
      ? [
          writeTable(
            {
              caption: `Measured curve of ${nameOf(type)}`,
              columns: [column('Deflection', 'deflection'), column('Load', 'force')],
              rows: type.law.points,
            },
            writer,
          ),
        ]
      : []),
    ...(type.design === null
      ? []
      : [
          { kind: 'heading' as const, text: `${nameOf(type)}: ${COMPONENT_WORDS[type.design.component]}` },
          { kind: 'facts' as const, rows: designFacts(type.design, writer) },
        ]),
    ...temperatureBlocks(type, writer),
  ])
}

function temperatureBlocks(type: MountType, writer: Writer): readonly Block[] {
  if (type.stiffnessAtTemperature === null) return []
  return [
    writeTable(
      {
        caption: `Stiffness of ${nameOf(type)} in vibration against temperature`,
        columns: [textColumn('Temperature'), column('Over that of its figures', 'ratio')],
        rows: type.stiffnessAtTemperature.map(([at, ratio]) => [formatTemperature(at, writer.system), ratio]),
      },
      writer,
    ),
  ]
}

/** Setting, working temperature and load sideways. */
export function settingFacts(project: Project, writer: Writer): readonly Fact[] {
  const { setting } = project.mounting
  const { temperature, lateralLoad } = project.analysis
  return [
    {
      label: 'Set on its mounts',
      value: setting.kind === 'asBuilt' ? 'on packing as built' : `level, aimed at ${AIMS[setting.by]}`,
    },
    ...(temperature === null
      ? []
      : [{ label: 'Working temperature', value: formatTemperature(temperature, writer.system) }]),
    ...(lateralLoad === null
      ? []
      : [
          {
            label: 'Static load sideways',
            value: `${writer.number(lateralLoad.factor, 'ratio')} of the weight, along ${directionWords(lateralLoad.direction)} and against it`,
          },
        ]),
  ]
}

const AIMS: Readonly<Record<Extract<Project['mounting']['setting'], { kind: 'levelled' }>['by'], string>> = {
  equalLoads: 'equal loads',
  ratedLoads: 'loads in proportion to the rated loads',
  equalDeflections: 'equal deflections',
  givenShares: 'the given shares of the weight',
}

function designFacts(design: ComponentDesign, writer: Writer): readonly Fact[] {
  const own = ownFacts(design, writer)
  return [
    { label: 'Design load', value: writer.quantity(design.load, 'force') },
    ...own,
    ...(design.correction === 1
      ? []
      : [{ label: 'Stiffness measured over computed', value: writer.quantity(design.correction, 'ratio') }]),
  ]
}

function ownFacts(design: ComponentDesign, writer: Writer): readonly Fact[] {
  switch (design.component) {
    case 'helicalSpring':
      return springFacts(design, writer)
    case 'rubberPad':
      return padFacts(design, writer)
    case 'airSpring':
      return airFacts(design, writer)
    default:
      return assertNever(design, 'component')
  }
}

function springFacts(design: SpringDesign, { quantity }: Writer): readonly Fact[] {
  const { material } = design
  return [
    { label: 'Wire diameter', value: quantity(design.wireDiameter, 'length') },
    { label: 'Mean coil diameter', value: quantity(design.coilDiameter, 'length') },
    { label: 'Active coils', value: quantity(design.activeCoils, 'ratio') },
    { label: 'Coils that do not work', value: quantity(design.endCoils, 'ratio') },
    { label: 'Free length', value: quantity(design.freeLength, 'length') },
    {
      label: 'Ends, forming',
      value: `${design.ends === 'closed' ? 'closed' : 'closed and ground'}, ${design.forming} coiled`,
    },
    { label: 'Seating coefficient', value: quantity(design.seating, 'ratio') },
    {
      label: 'Wire',
      value: `${material.name === '' ? 'class not given' : material.name}; G ${quantity(material.shearModulus, 'stress')}, E ${quantity(material.youngsModulus, 'stress')}, density ${quantity(material.density, 'density')}`,
    },
    {
      label: 'Tensile strength, permissible share',
      value: `${quantity(material.strength, 'stress')}, ${quantity(material.permissibleShare, 'share')}`,
    },
  ]
}

function padFacts(design: PadDesign, { quantity }: Writer): readonly Fact[] {
  const { shape, rubber } = design
  return [
    {
      label: 'Outline',
      value:
        shape.kind === 'disc'
          ? `disc of ${quantity(shape.diameter, 'length')}, hole ${quantity(shape.bore, 'length')}`
          : `rectangle, ${quantity(shape.length, 'length')} along x, ${quantity(shape.width, 'length')} along y`,
    },
    {
      label: 'Layers, thickness of one',
      value: `${quantity(design.layers, 'ratio')}, ${quantity(design.thickness, 'length')}`,
    },
    {
      label: 'Rubber',
      value:
        rubber.from === 'hardness'
          ? `natural rubber, hardness ${quantity(rubber.hardness, 'ratio')} IRHD`
          : `E₀ ${quantity(rubber.youngsModulus, 'stress')}, G ${quantity(rubber.shearModulus, 'stress')}, k ${quantity(rubber.compressionFactor, 'ratio')}, bulk modulus ${quantity(rubber.bulkModulus, 'stress')}`,
    },
    {
      label: 'Compressibility of the rubber itself',
      value: design.volumeCompressibility ? 'counted' : 'left out',
    },
    {
      label: 'Largest compression, largest shear',
      value: `${quantity(design.compressionLimit, 'share')}, ${quantity(design.shearLimit, 'share')}`,
    },
    { label: 'Creep per tenfold of time', value: quantity(design.creepPerDecade, 'share') },
  ]
}

function airFacts(design: AirDesign, { quantity }: Writer): readonly Fact[] {
  return [
    { label: 'Effective area', value: quantity(design.effectiveArea, 'area') },
    { label: 'Growth of the area over compression', value: quantity(design.areaSlope, 'length') },
    { label: 'Volume of the bellows', value: quantity(design.bellowsVolume, 'volume') },
    { label: 'Volume joined to it', value: quantity(design.auxiliaryVolume, 'volume') },
    {
      label: 'Exponents of vibration, of slow changes',
      value: `${quantity(design.exponent, 'ratio')}, ${quantity(design.slowExponent, 'ratio')}`,
    },
    { label: 'Surrounding air, absolute', value: quantity(design.atmosphericPressure, 'pressure') },
    { label: 'Stiffness sideways, from its maker', value: quantity(design.lateralStiffness, 'stiffness') },
    { label: 'Highest gauge pressure', value: quantity(design.highestPressure, 'pressure') },
    { label: 'Way down to the stop', value: quantity(design.bumpTravel, 'deflection') },
    { label: 'Design height', value: quantity(design.height, 'length') },
  ]
}
