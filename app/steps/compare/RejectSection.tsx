import { memo, useState } from 'react'
import type { CandidateDoc, StudyDoc } from '../../../core/index.ts'
import { rejectCandidate, takeBackCandidate } from '../../document/index.ts'
import { Button, CommitField, Select } from '../../ui/index.ts'
import { RANKING_WORDS } from '../../words/index.ts'
import { useSession } from '../session/index.ts'

const nameOf = (c: CandidateDoc): string => (c.name && c.name !== c.id ? `${c.id} ${c.name}` : c.id)

/** Candidates given up, with the reason, and giving one up. */
export const RejectSection = memo(function RejectSection({ doc }: { doc: StudyDoc }) {
  const { study } = useSession()
  const [chosen, setChosen] = useState<string | null>(null)
  const rejected = doc.candidates.filter((c) => c.rejected !== undefined)
  const kept = doc.candidates.filter((c) => c.rejected === undefined)
  const id = kept.find((c) => c.id === chosen)?.id ?? null
  return (
    <section className="rejected" aria-label={RANKING_WORDS.rejected}>
      <h3>{RANKING_WORDS.rejected}</h3>
      {rejected.length === 0 ? (
        <p className="ink-2">None; a rejected candidate is no longer worked out and stays in the memo with its reason</p>
      ) : (
        <table className="table">
          <caption className="visually-hidden">{RANKING_WORDS.rejected}</caption>
          <thead>
            <tr>
              <th scope="col">Candidate</th>
              <th scope="col" className="text">
                Reason
              </th>
              <td />
            </tr>
          </thead>
          <tbody>
            {rejected.map((c) => (
              <tr key={c.id}>
                <td className="candidate">{nameOf(c)}</td>
                <td className="text">{c.rejected}</td>
                <td>
                  <Button small look="quiet" label={`Take back ${c.id}`} onPress={() => takeBackCandidate(study, c.id)}>
                    take back
                  </Button>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      {kept.length > 1 ? (
        <div className="reject-row">
          <Select label="Reject" value={id ?? ''} choices={kept.map((c) => ({ id: c.id, words: nameOf(c) }))} onChange={setChosen} />
          {id ? (
            <CommitField
              key={id}
              label="Reason"
              text=""
              shape="wide"
              placeholder="why it is out; Enter rejects it"
              onCommit={(text) => {
                if (text.trim() === '') return 'say why'
                rejectCandidate(study, id, text)
                setChosen(null)
                return null
              }}
            />
          ) : null}
        </div>
      ) : null}
    </section>
  )
})
