import { useQuery } from '@tanstack/react-query';
import type { QueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import { AnswerLines } from '../../features/decode/answer-lines.tsx';
import { CandidateTable } from '../../features/decode/candidate-table.tsx';
import { CastingChoice } from '../../features/decode/casting-choice.tsx';
import { CipherChoice } from '../../features/decode/cipher-choice.tsx';
import { CipherMatches } from '../../features/decode/cipher-matches.tsx';
import { useCipherNotes } from '../../features/decode/cipher-notes.tsx';
import { castingInHand, makersToChoose, modelsToChoose } from '../../features/decode/decode-queries.ts';
import { DIVISIONS_SHOWN, divisionsOf } from '../../features/decode/divisions.ts';
import { EXAMPLE, exampleAddress } from '../../features/decode/example.ts';
import { faultOfMark } from '../../features/decode/fault-of-mark.ts';
import { MachineForm } from '../../features/decode/machine-form.tsx';
import { machineNotes } from '../../features/decode/machine-notes.tsx';
import { ruleOfDecode, sayRule } from '../../features/decode/rule-of-decode.ts';
import { ThrownOut } from '../../features/decode/thrown-out.tsx';
import { useDecodeState } from '../../features/decode/use-decode-state.ts';
import { useDecoding } from '../../features/decode/use-decoding.ts';
import { useFit } from '../../features/decode/use-fit.ts';
import { VerdictPanel } from '../../features/decode/verdict-panel.tsx';
import { useDraft } from '../../lib/use-draft.ts';
import { Caution } from '../../ui/caution.tsx';
import { CopyAddress } from '../../ui/copy-address.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { MarkEntry } from '../../ui/mark-entry.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { TimeRule } from '../../ui/time-rule.tsx';

/** Starts loading what can be chosen, and waits for none of it: a mark can be typed while the register is away. */
export function loader(queryClient: QueryClient): LoaderFunction {
  return () => {
    queryClient.query(makersToChoose()).catch(shownByItsField);
    queryClient.query(modelsToChoose()).catch(shownByItsField);
    return null;
  };
}

/** A list that can't be loaded is told beside the field that needs it. */
function shownByItsField(): void {}

export function Component() {
  const [state, change] = useDecodeState();
  const [mark, setMark] = useDraft(state.mark, (text) => change({ mark: text }, 'typed'));
  const decoded = useDecoding(state);
  const held = useFit(state, decoded.inHand);
  const casting = useQuery(castingInHand(state.casting));
  const cipherNotes = useCipherNotes(decoded.inHand);
  const notes = machineNotes(held.build, held.fit === null ? null : held.position, cipherNotes.length + 1);
  const { answer, inHand } = decoded;
  const stale = decoded.stale || mark !== state.mark;
  const rule = inHand === null || inHand.candidates.length === 0 ? null : ruleOfDecode({ result: inHand, casting: casting.data ?? null, build: held.build, fit: held.fit });

  return (
    <>
      <PageTitle title="Decode a mark" below={<HowTo offerExample={state.mark === '' && mark === ''} />}>
        When was it poured?
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block notes={cipherNotes} margin={<BeforeCleaning />}>
            <MarkEntry
              label="The mark on the casting"
              value={mark}
              onChange={setMark}
              fault={faultOfMark(mark)}
              divisions={stale || inHand === null ? [] : divisionsOf(inHand.candidates).slice(0, DIVISIONS_SHOWN)}
              lit={stale ? null : (inHand?.settle[0]?.position ?? null)}
            />
            <CipherChoice state={state} change={change} />
            {state.mark === '' && mark === '' && <FirstStep />}
            {decoded.error !== null && <FailureNote error={decoded.error} onAgain={decoded.again} />}
            {state.mark !== '' && answer === null && decoded.error === null && faultOfMark(mark) === null && <Skeleton lines={4} label="Decoding" />}
            {answer !== null && <AnswerLines answer={answer} inHand={inHand} stale={stale} tried={state.maker === null ? 'all' : 'one maker'} />}
            {answer !== null && inHand === null && <CipherMatches answer={answer} change={change} stale={stale} />}
            {inHand !== null && <CandidateTable result={inHand} fit={held.fit} serial={state.serial} stale={stale} />}
            {inHand !== null && <ThrownOut reasons={inHand.reasons} />}
          </Block>
          <PartingLine />
          <Block heading="Hold it against a machine" notes={notes.notes} margin={<AboutSerials />}>
            <MachineForm state={state} change={change} model={held.model} refused={held.error} />
            <VerdictPanel held={held} notes={notes} missing={inHand === null ? sayMissing(state.mark, answer !== null) : 'The mark has no date to hold against it.'} />
          </Block>
          {rule !== null && (
            <>
              <PartingLine />
              <Block heading="On one rule" margin={<SendIt />}>
                <TimeRule title={sayRule(rule)} lanes={rule.lanes} focus={rule.focus} />
                <CastingChoice state={state} change={change} />
              </Block>
            </>
          )}
        </PageGrid>
      </div>
    </>
  );
}


function sayMissing(mark: string, answered: boolean): string | null {
  if (mark === '') return 'Type the mark above to hold it against this machine.';
  return answered ? 'Choose the cipher above to hold its dates against this machine.' : null;
}

function HowTo({ offerExample }: { readonly offerExample: boolean }) {
  const models = useQuery(modelsToChoose());
  const hasExample = offerExample && (models.data?.some(({ slug }) => slug === EXAMPLE.model) ?? false);
  return (
    <>
      Type the mark as you see it. Say where you can’t.
      {hasExample && (
        <>
          {' '}
          Or try{' '}
          <Link to={exampleAddress()}>
            {EXAMPLE.mark} from a 30 Crawler
          </Link>
          .
        </>
      )}
    </>
  );
}

function FirstStep() {
  return (
    <EmptyState title="Nothing on the plate yet">
      Every date the mark can mean will stand here, with its share and its reasons. Add a machine below and the register says whether the part can have
      left the works on it.
    </EmptyState>
  );
}

function BeforeCleaning() {
  return (
    <Caution title="Before you clean it">
      Photograph the mark first. A wire wheel blurs it for good and throws bristles. Old paint may hold lead: test it, work wet, keep the dust off hands and
      food.
    </Caution>
  );
}

function AboutSerials() {
  return (
    <div className="text-[14px] leading-[1.45] text-slag">
      <p>
        Altering or taking off a serial plate or an identification mark may be an offence: ask your local authority. A fit says nothing about who owns the
        machine or whether it is sound.
      </p>
    </div>
  );
}

function SendIt() {
  return (
    <div className="text-[14px] leading-[1.45] text-slag">
      <p className="mb-3">No account is needed. The address of this page holds everything you typed: send it to whoever has the part.</p>
      <CopyAddress />
    </div>
  );
}
