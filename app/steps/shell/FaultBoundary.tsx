import { Component, type ReactNode } from 'react'
import { Notice } from '../../ui/Marks.tsx'

/** A fault in one part of the page leaves the others, and the document, as they are. */
export class FaultBoundary extends Component<{ children: ReactNode }, { fault: Error | null }> {
  override state: { fault: Error | null } = { fault: null }
  static getDerivedStateFromError(fault: Error) {
    return { fault }
  }
  override render() {
    const { fault } = this.state
    if (!fault) return this.props.children
    return (
      <Notice tone="bad" title="This part has stopped" action={{ words: 'Try again', run: () => this.setState({ fault: null }) }}>
        {fault.message}. The study is kept.
      </Notice>
    )
  }
}
