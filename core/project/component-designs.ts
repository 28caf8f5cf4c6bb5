import { z } from 'zod'
import { label, optionalQuantity, quantity } from './fields.ts'

const size = (what: string) => optionalQuantity('length', what, { above: 0, max: 100 })
const load = optionalQuantity('force', 'static load on one mount for which it is designed', { above: 0 })
const correction = quantity(
  'ratio',
  'stiffness measured on a sample over the computed one, in every direction; 1 until measured',
  { above: 0, max: 100 },
).default(1)

const wire = z
  .strictObject({
    name: label('class of wire, such as "EN 10270-1 SH"'),
    shearModulus: quantity('stress', 'shear modulus G', { above: 0 }).default(79.3e9),
    youngsModulus: quantity('stress', "Young's modulus E", { above: 0 }).default(206e9),
    density: quantity('density', 'density', { above: 0 }).default(7850),
    strength: optionalQuantity('stress', 'least tensile strength of this class at this diameter', {
      above: 0,
    }),
    permissibleShare: quantity('share', 'permissible shear stress as a share of the tensile strength', {
      above: 0,
      max: 1,
    }).default(0.56),
  })
  .prefault({})
  .meta({ description: 'material of the wire, figures of its maker' })

export const springDesignSchema = z.strictObject({
  component: z.literal('helicalSpring'),
  wireDiameter: size('diameter of the wire'),
  coilDiameter: size('mean diameter of the coils'),
  activeCoils: optionalQuantity('ratio', 'coils that work', { above: 0, max: 1000 }),
  freeLength: size('length without load'),
  ends: z
    .enum(['closedGround', 'closed'])
    .default('closedGround')
    .meta({ description: 'end coils closed and ground flat, or closed only' }),
  endCoils: quantity('ratio', 'coils at both ends together that do not work', { min: 0, max: 20 }).default(2),
  forming: z
    .enum(['cold', 'hot'])
    .default('cold')
    .meta({ description: 'how it is coiled, which says what clearance between coils must be left' }),
  seating: quantity(
    'ratio',
    'seating coefficient of EN 13906-1 for buckling: 0.5 both ends guided, 1 one end free to move sideways but kept parallel, as under a machine, 2 one end free',
    { min: 0.5, max: 2 },
  ).default(1),
  load,
  material: wire,
  correction,
})

const padShape = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('disc'),
    diameter: size('outer diameter'),
    bore: quantity('length', 'diameter of the hole; 0: none', { min: 0, max: 100 }).default(0),
  }),
  z.strictObject({
    kind: z.literal('rectangle'),
    length: size('length along local x'),
    width: size('width along local y'),
  }),
])

const rubber = z.discriminatedUnion('from', [
  z.strictObject({
    from: z.literal('hardness'),
    hardness: optionalQuantity('ratio', 'hardness of natural rubber [IRHD]', { above: 0, max: 100 }),
  }),
  z.strictObject({
    from: z.literal('typed'),
    youngsModulus: optionalQuantity('stress', "Young's modulus E0 at small strain", { above: 0 }),
    shearModulus: optionalQuantity('stress', 'shear modulus G at small strain', { above: 0 }),
    compressionFactor: quantity('ratio', 'k in the compression modulus E0 (1 + 2 k S²)', {
      min: 0,
      max: 2,
    }).default(0.7),
    bulkModulus: quantity('stress', 'bulk modulus', { above: 0 }).default(1.1e9),
  }),
])

export const padDesignSchema = z.strictObject({
  component: z.literal('rubberPad'),
  shape: padShape.prefault({ kind: 'disc' }).meta({ description: 'plan of the pad' }),
  thickness: size('thickness of the rubber in one layer'),
  layers: z
    .number()
    .int()
    .min(1)
    .max(50)
    .default(1)
    .meta({ description: 'layers of rubber on top of each other, parted by bonded plates' }),
  rubber: rubber
    .prefault({ from: 'hardness' })
    .meta({ description: 'the rubber, by its hardness or its typed moduli' }),
  volumeCompressibility: z
    .boolean()
    .default(true)
    .meta({ description: 'count with the compressibility of the rubber itself, which thin layers feel' }),
  load,
  compressionLimit: quantity('share', 'largest static compression as a share of the thickness', {
    above: 0,
    max: 0.9,
  }).default(0.15),
  shearLimit: quantity('share', 'largest static shear as a share of the thickness', {
    above: 0,
    max: 5,
  }).default(0.3),
  creepPerDecade: optionalQuantity(
    'share',
    'growth of the compression in each tenfold of time, measured or from the maker',
    { min: 0, max: 1 },
  ),
  correction,
})

export const airDesignSchema = z.strictObject({
  component: z.literal('airSpring'),
  load,
  effectiveArea: optionalQuantity('area', 'effective area at the design height', { above: 0, max: 100 }),
  areaSlope: quantity('length', 'growth of the effective area per compression, area over travel', {
    min: -100,
    max: 100,
  }).default(0),
  bellowsVolume: optionalQuantity('volume', 'volume of the bellows at the design height', {
    above: 0,
    max: 1000,
  }),
  auxiliaryVolume: quantity('volume', 'volume joined to the bellows through a wide line', {
    min: 0,
    max: 1000,
  }).default(0),
  exponent: quantity('ratio', 'polytropic exponent of vibration: 1.4 adiabatic for air', {
    min: 1,
    max: 1.7,
  }).default(1.4),
  slowExponent: quantity('ratio', 'polytropic exponent of slow changes: 1 isothermal', {
    min: 1,
    max: 1.7,
  }).default(1),
  atmosphericPressure: quantity('pressure', 'pressure of the surrounding air, absolute', {
    min: 0,
    max: 1e7,
  }).default(101325),
  lateralStiffness: optionalQuantity(
    'stiffness',
    "stiffness sideways at the design height and load, from the bellows' maker; negative where it gives way",
  ),
  highestPressure: optionalQuantity('pressure', 'largest gauge pressure that the bellows may have', {
    above: 0,
  }),
  bumpTravel: optionalQuantity('deflection', 'way from the design height down to the stop', { above: 0 }),
  height: size('design height'),
  correction,
})

export const componentDesignSchema = z
  .discriminatedUnion('component', [springDesignSchema, padDesignSchema, airDesignSchema])
  .meta({ description: 'dimensions from which stiffness and limits of the mount are computed' })

export type SpringDesign = z.infer<typeof springDesignSchema>
export type PadDesign = z.infer<typeof padDesignSchema>
export type AirDesign = z.infer<typeof airDesignSchema>
export type ComponentDesign = z.infer<typeof componentDesignSchema>
