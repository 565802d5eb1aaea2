import { useSyncExternalStore } from 'react'
import type { Channel } from './types.ts'

/** The value of a channel; renders again when it changes. Not for the pointer: that is written to refs. */
export const useChannel = <T>(channel: Channel<T>): T => useSyncExternalStore(channel.listen, channel.get)
