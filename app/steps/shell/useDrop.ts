import { useEffect, useState } from 'react'
import { useSession } from '../session/index.ts'

/** Files dropped anywhere on the page are taken in; true while some are held over it. */
export function useDrop(): boolean {
  const session = useSession()
  const [over, setOver] = useState(false)
  useEffect(() => {
    const hasFiles = (e: DragEvent) => e.dataTransfer?.types.includes('Files') ?? false
    const onOver = (e: DragEvent) => {
      if (!hasFiles(e)) return
      e.preventDefault()
      setOver(true)
    }
    const onLeave = (e: DragEvent) => {
      if (e.relatedTarget === null) setOver(false)
    }
    const onDrop = (e: DragEvent) => {
      setOver(false)
      const files = [...(e.dataTransfer?.files ?? [])]
      if (files.length === 0) return
      e.preventDefault()
      void session.take(files)
    }
    window.addEventListener('dragover', onOver)
    window.addEventListener('dragleave', onLeave)
    window.addEventListener('drop', onDrop)
    return () => {
      window.removeEventListener('dragover', onOver)
      window.removeEventListener('dragleave', onLeave)
      window.removeEventListener('drop', onDrop)
    }
  }, [session])
  return over
}
