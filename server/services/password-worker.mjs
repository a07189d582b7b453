// Hashing takes a tenth of a second of pure arithmetic: on a thread of its own it holds up nobody's reading.
import { parentPort } from 'node:worker_threads'
import bcrypt from 'bcryptjs'

parentPort.on('message', ({ id, password, cost, hash }) => {
  const result = hash === undefined ? bcrypt.hashSync(password, cost) : bcrypt.compareSync(password, hash)
  parentPort.postMessage({ id, result })
})
