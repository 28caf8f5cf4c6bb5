import {
  type FactoryFunctionMap,
  addDependencies,
  create,
  divideDependencies,
  multiplyDependencies,
  parseDependencies,
  powDependencies,
  subtractDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
  createUnitDependencies,
  UnitDependencies,
} from 'mathjs'

const factories = {
  addDependencies,
  createUnitDependencies,
  divideDependencies,
  multiplyDependencies,
  parseDependencies,
  powDependencies,
  subtractDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
  UnitDependencies,
} as FactoryFunctionMap // declared through an index signature, which strict checking reads as possibly undefined

/** One mathjs instance with units, parsing and the four operations; nothing else is reachable. */
export const engine = create(factories, {})

engine.createUnit('rpm', { definition: `${(2 * Math.PI) / 60} rad/s` })
// A unit of its own kind, so that a bare number and a percentage are never added.
engine.createUnit('percent')
engine.createUnit('slug', '1 lbf s^2/ft')
// mathjs rounds its own to eight and ten digits
engine.createUnit('kip', '1000 lbf', { override: true })
engine.createUnit('psi', '1 lbf/inch^2', { override: true })
