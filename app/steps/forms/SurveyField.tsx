import { useRef, useState } from 'react'
import { type CandidateDoc, isInputError, readSurvey } from '../../../core/index.ts'
import { optionKey, removeSurvey, setSurvey, takeSurvey } from '../../document/index.ts'
import { freshName } from '../../files/index.ts'
import { Button, Check } from '../../ui/index.ts'
import { formatAngle, formatAzimuth, SURVEY_WORDS, textOf } from '../../words/index.ts'
import { useResults, useSession, useView } from '../session/index.ts'

/** The horizon surveyed at a candidate: its file, how far it lies from the computed one, and whether it is taken. */
export function SurveyField({ candidate: c }: { candidate: CandidateDoc }) {
  const { study, files } = useSession()
  const input = useRef<HTMLInputElement>(null)
  const [why, setWhy] = useState('')
  const option = useView((v) => v.option)
  const found = useResults((r) =>
    option?.candidate === c.id ? (r.byOption.get(optionKey(option))?.figures.measuredHorizon ?? null) : null,
  )
  const take = async (file: File) => {
    try {
      readSurvey(await file.text(), file.name)
    } catch (error) {
      if (!isInputError(error)) throw error
      setWhy(error.message)
      return
    }
    setWhy('')
    const name = freshName(file.name, files.getState().files)
    files.getState().give([{ name, blob: file }])
    setSurvey(study, c.id, name)
  }
  const stated = c.measuredHorizon?.file
  return (
    <div className="stack">
      <div className="row">
        <span className="ink-2">{SURVEY_WORDS.file}</span>
        {stated ? <span className="small">{stated}</span> : null}
        <Button small label={`${SURVEY_WORDS.file} of ${c.id} from a file`} onPress={() => input.current?.click()}>
          {stated ? SURVEY_WORDS.change : SURVEY_WORDS.open}
        </Button>
        {stated ? (
          <Button
            small
            look="quiet"
            label={`${SURVEY_WORDS.remove} the surveyed horizon of ${c.id}`}
            onPress={() => removeSurvey(study, c.id)}
          >
            {SURVEY_WORDS.remove}
          </Button>
        ) : null}
        <input
          ref={input}
          type="file"
          hidden
          accept=".csv,.txt"
          data-role={`survey-${c.id}`}
          onChange={(e) => {
            const [file] = e.target.files ?? []
            e.target.value = ''
            if (file) void take(file)
          }}
        />
      </div>
      {why ? (
        <span className="help bad" role="alert">
          {why}
        </span>
      ) : stated ? null : (
        <span className="help">{SURVEY_WORDS.columns}</span>
      )}
      {stated ? (
        <Check value={c.useMeasuredHorizon === true} onChange={(on) => takeSurvey(study, c.id, on)}>
          {SURVEY_WORDS.take}
        </Check>
      ) : null}
      {stated && found?.worst ? (
        <span className="help">
          {found.rows.length} azimuths; surveyed less computed from this mast: mean {textOf(formatAngle(found.meanDeg))}, most{' '}
          {textOf(formatAngle(found.worst.differenceDeg))} at {textOf(formatAzimuth(found.worst.azimuthDeg))}
        </span>
      ) : null}
    </div>
  )
}
