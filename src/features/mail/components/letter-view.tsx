import type { MailResponse } from '#shared/api/mail'
import { Button } from '../../../components/button'
import { FormError } from '../../../components/form'
import { Mark } from '../../../components/marks'
import { Section } from '../../../components/page'
import { Facts } from '../../../components/ruled-list'
import { sayWhatFailed } from '../../../lib/problem'
import { useRetry } from '../api/get-mail'
import { kindWords, stateMarks, stateWord, whenWords } from '../mail-words'

/** One letter: what became of it, and what it says, as HTML in a frame that can do nothing, and as plain text. */
export function LetterView({ letter: { mail, isTray } }: { letter: MailResponse }) {
  const retry = useRetry(mail.id)
  return (
    <div className="grid gap-x-10 gap-y-8 desktop:grid-cols-[minmax(0,24rem)_minmax(0,1fr)]">
      <div className="grid content-start gap-4">
        <p className="flex items-center gap-3 text-20 font-semibold">
          <Mark name={stateMarks[mail.state]} size={24} />
          {stateWord(mail, isTray)}
        </p>
        <Facts
          className="wrap-anywhere"
          facts={[
            ['What for', kindWords[mail.kind]],
            ['To', mail.to],
            ['Written', whenWords(mail.createdAt)],
            ...(mail.sentAt === null ? [] : ([[isTray ? 'Put here' : 'Sent', whenWords(mail.sentAt)]] as const)),
            ...(mail.nextAt === null ? [] : ([['Tried next', whenWords(mail.nextAt)]] as const)),
            ['Tries', String(mail.attempts)],
            ...(mail.lastError === null ? [] : ([['Why it was not taken', mail.lastError]] as const)),
            ...(mail.messageId === null
              ? []
              : ([
                  [
                    'Message-ID',
                    <span key="id" className="font-mono text-14">
                      {mail.messageId}
                    </span>,
                  ],
                ] as const)),
          ]}
        />
        <FormError message={retry.error && sayWhatFailed(retry.error)} attempt={retry.failureCount} />
        {mail.state === 'dead' && (
          <Button kind="next" busy={retry.isPending && 'Queueing it'} onClick={() => retry.mutate()}>
            Try it again
          </Button>
        )}
        <p className="text-graphite">
          {isTray
            ? 'No mail server is set up, so letters stay here. Hand over what a letter says, or its link, to the person it is to and to nobody else.'
            : 'Secret links are in the letter that was sent and not here.'}
        </p>
      </div>
      <div className="grid grid-cols-1 content-start gap-8">
        <Section title="As it is read">
          {/* No script, no form, no way out of the frame: what somebody typed into a name stays text. */}
          <iframe
            title={`The letter “${mail.subject}”`}
            sandbox=""
            srcDoc={mail.html}
            className="h-[34rem] w-full border-2 border-rule bg-white"
          />
        </Section>
        <Section title="As plain text">
          <pre className="ground-sheet overflow-x-auto border border-hairline p-4 text-14 wrap-anywhere whitespace-pre-wrap">
            {mail.text}
          </pre>
        </Section>
      </div>
    </div>
  )
}
