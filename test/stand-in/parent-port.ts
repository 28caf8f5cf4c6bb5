/** Loaded before the module of a utility process: gives it the port that Electron would. */
import { EventEmitter } from 'node:events'

const port = Object.assign(new EventEmitter(), {
  postMessage: (message: object) => process.send?.(message),
})
process.on('message', (data) => port.emit('message', { data, ports: [] }))
Object.defineProperty(process, 'parentPort', { value: port })
