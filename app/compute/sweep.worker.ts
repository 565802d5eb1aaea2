/// <reference lib="webworker" />
import { type HelperAsk, makeSweepHelper } from '../../core/index.ts'

// A thread that does its share of sweeps over the ground of the study worker.
const take = makeSweepHelper()
self.onmessage = ({ data }: MessageEvent<HelperAsk>) => take(data)
