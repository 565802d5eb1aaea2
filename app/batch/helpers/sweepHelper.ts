import { parentPort } from 'node:worker_threads'
import { type HelperAsk, makeSweepHelper } from '../../../core/index.ts'

// A thread that does its share of sweeps over one shared ground.
const take = makeSweepHelper()
parentPort?.on('message', (ask: HelperAsk) => take(ask))
