import type { MailRow } from '#shared/api/mail'
import { Mark } from '../../../components/marks'
import { RuledList, RuledRow } from '../../../components/ruled-list'
import { paths } from '../../../paths'
import { kindWords, stateMarks, stateWord, whenWords } from '../mail-words'

/** Letters, the newest first: to whom, about what, and how far each has come. */
export function MailList({ mail, isTray }: { mail: readonly MailRow[]; isTray: boolean }) {
  return (
    <RuledList>
      {mail.map((letter) => (
        <RuledRow
          key={letter.id}
          to={paths.letter.href(letter.id)}
          mark={<Mark name={stateMarks[letter.state]} size={22} />}
          title={letter.subject}
          note={
            <>
              <span className="block wrap-anywhere">{`${kindWords[letter.kind]}, to ${letter.to}`}</span>
              <span className="block tablet:hidden">{`${stateWord(letter, isTray)}, ${whenWords(letter.createdAt)}`}</span>
            </>
          }
          asideFrom="tablet"
          aside={stateWord(letter, isTray)}
          asideNote={whenWords(letter.createdAt)}
        />
      ))}
    </RuledList>
  )
}
