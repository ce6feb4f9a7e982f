/** Pieces of pages, as the screens use them. */
import { AreaLinks } from '@/components/shell/area-links';
import { Button, ButtonLink } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { CopyText } from '@/components/ui/copy-text';
import { EmptyState } from '@/components/ui/empty-state';
import { Facts } from '@/components/ui/facts';
import { CheckboxField, NumberField, SelectField, TextArea, TextField } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { PageTitle, Strong } from '@/components/ui/page-title';
import { Pager } from '@/components/ui/pager';
import { ProgressBar } from '@/components/ui/progress-bar';
import { Beside, Section, Sheet } from '@/components/ui/section';
import { SkeletonRows } from '@/components/ui/skeleton-rows';
import { Cell, HeadCell, Table, TableBody, TableHead, TableRow } from '@/components/ui/table';
import { TallyStrip } from '@/components/ui/tally-strip';
import { VERDICTS, Verdict } from '@/components/ui/verdict';
import { BandedRange } from '@/components/drawings/banded-range';
import { IcDrawing } from '@/components/drawings/ic-drawing';
import { ResistorDrawing } from '@/components/drawings/resistor-drawing';
import { LookDialog, LookPad } from './look-client';

export function LookPieces() {
  return (
    <>
      <PageTitle
        above={
          <AreaLinks
            label="Circuits"
            links={[
              { word: 'All circuits', href: '/look' },
              { word: 'Batches', href: '/circuits/batches', count: 3 },
              { word: 'Lines to settle', href: '/circuits/settle', count: 12 },
            ]}
          />
        }
        title="Slope Pair"
        remainder="revision C"
        facts={[
          <>
            rails <Strong mono>+12 V −12 V</Strong>
          </>,
          '38 lines, 61 designators',
          <>
            from <Strong>slope-pair-main.xlsx</Strong>, two sheets
          </>,
          <>
            making <Strong mono>2</Strong>
          </>,
        ]}
        actions={
          <>
            <Button>Compare with B</Button>
            <ButtonLink href="/look">Effects</ButtonLink>
            <Button kind="primary">Reserve for 2</Button>
          </>
        }
      />
      <TallyStrip
        label="Lines by state"
        segments={[
          { key: 'shelf', count: 29, word: 'on the shelf', tone: 'good', href: '/look?state=shelf' },
          { key: 'effect', count: 4, word: 'with an effect', tone: 'look', href: '/look?state=effect', current: true },
          { key: 'ask', count: 2, word: 'to ask', tone: 'ask', href: '/look?state=ask' },
          { key: 'buy', count: 3, word: 'to buy', tone: 'stop', href: '/look?state=buy' },
        ]}
      />
      <Beside
        beside={
          <Sheet title="U3: may CD4011BE stand in?">
            <p>
              <Verdict verdict="refused" word="Refused" strong /> in a timing place a plain NAND does not oscillate
              cleanly.
            </p>
            <div className="my-4">
              <Table label="Wanted and offered" dense>
                <TableHead>
                  <HeadCell hideLabel>Check</HeadCell>
                  <HeadCell>CD4093BE</HeadCell>
                  <HeadCell>CD4011BE</HeadCell>
                  <HeadCell hideLabel>Verdict</HeadCell>
                </TableHead>
                <TableBody>
                  {(['Function', 'Inputs', 'Supply'] as const).map((check) => (
                    <TableRow key={check}>
                      <Cell head soft>
                        {check}
                      </Cell>
                      <Cell>{check === 'Inputs' ? 'Schmitt' : '4 × NAND'}</Cell>
                      <Cell>{check === 'Inputs' ? 'plain' : '4 × NAND'}</Cell>
                      <Cell>
                        <Verdict verdict={check === 'Inputs' ? 'refused' : 'same'} signOnly />
                      </Cell>
                    </TableRow>
                  ))}
                </TableBody>
              </Table>
            </div>
            <p className="mb-2">
              <strong className="font-semibold">Effect on “Clock rate”</strong>{' '}
              <span className="text-soft">U3, R12, C9</span>
            </p>
            <BandedRange
              label="Clock rate"
              bandPercent={5}
              asked={{ percent: 0, lowPercent: -2.4, highPercent: 2.5, text: '4.21 Hz' }}
              offered={null}
            />
            <BandedRange
              label="Clock rate"
              bandPercent={5}
              asked={{ percent: 0, lowPercent: -2.4, highPercent: 2.5, text: '4.21 Hz' }}
              offered={{ percent: 3.1, lowPercent: -1, highPercent: 7, text: '4.34 Hz (+53 cents)' }}
            />
            <div className="mt-4 flex flex-wrap gap-2.5">
              <Button kind="primary">Take HEF4093BP</Button>
              <Button>Buy CD4093BE</Button>
            </div>
            <p className="mt-3 text-fine text-soft">Typical values; the maker’s datasheet decides.</p>
          </Sheet>
        }
      >
        <Table label="Lines" stacked>
          <TableHead>
            <HeadCell>Designators</HeadCell>
            <HeadCell>What it asks for</HeadCell>
            <HeadCell>Look for</HeadCell>
            <HeadCell number>Need</HeadCell>
            <HeadCell number sorted="descending">
              Free
            </HeadCell>
            <HeadCell>Verdict</HeadCell>
          </TableHead>
          <TableBody>
            {VERDICTS.map((verdict, index) => (
              <TableRow key={verdict} selected={index === 3} tone={index === 4 ? 'hatched' : undefined}>
                <Cell head mono>
                  R{index + 1}–R{index + 4}
                </Cell>
                <Cell label="Asks for">Resistor 4.7 kΩ 1 %</Cell>
                <Cell label="Look for">
                  {index === 3 ? (
                    <IcDrawing pins={14} mark="CD4093BE" name="IC, 14 pins, marked CD4093BE" />
                  ) : (
                    <ResistorDrawing
                      bands={['yellow', 'violet', 'black', 'brown', 'brown']}
                      body="blue"
                      name="yellow, violet, black, brown, brown"
                    />
                  )}
                </Cell>
                <Cell label="Need" number>
                  {8 * index}
                </Cell>
                <Cell label="Free" number>
                  340
                </Cell>
                <Cell label="Verdict">
                  <Verdict verdict={verdict} />
                </Cell>
              </TableRow>
            ))}
          </TableBody>
        </Table>
        <Pager first={1} last={50} total={1234} what="movements" previousHref={null} nextHref="/look?page=2" />
        <Section title="Notices" remainder="and cautions">
          <div className="grid gap-3">
            <Notice tone="good">Bag read: it is on this order</Notice>
            <Notice tone="look" title="Two builders wait for this part">
              Both batches can be reserved after this.
            </Notice>
            <Notice tone="stop" title="The file could not be read" actions={<Button size="small">Another file</Button>}>
              Row 14 has more columns than the head. Nothing was saved.
            </Notice>
            <Notice tone="plain">An order is sent when it is approved.</Notice>
            <Caution level="danger" title="Mains: no stand-in is offered">
              X2 capacitors are chosen under IEC 60384-14. The local electrical code and a licensed person decide.
            </Caution>
            <Caution title="Mind the polarity">The stripe on the can is the negative lead.</Caution>
          </div>
        </Section>
      </Beside>
      <Section title="Buttons">
        <div className="flex flex-wrap items-center gap-3">
          <Button kind="primary">Primary</Button>
          <Button>Secondary</Button>
          <Button kind="quiet">Quiet</Button>
          <Button kind="danger">Withdraw</Button>
          <Button kind="primary" disabled>
            Disabled
          </Button>
          <Button size="small">Small</Button>
          <Button kind="primary" size="large">
            Took 8
          </Button>
          <LookDialog />
        </div>
      </Section>
      <Section title="Fields">
        <div className="grid max-w-3xl gap-4 sm:grid-cols-2">
          <TextField label="Part number" mono defaultValue="TL072CP" hint="As it stands on the part." />
          <NumberField label="Units" defaultValue="2" error="Only whole numbers from 1 to 500." />
          <NumberField label="Rail" unit="V" whole={false} optional defaultValue="12" />
          <SelectField
            label="Cabinet"
            options={[
              { value: 'a', label: 'Cabinet A, back room' },
              { value: 'b', label: 'Cabinet B' },
            ]}
          />
          <TextArea label="Note" optional />
          <CheckboxField label="Remember for this workshop" hint="Asked again when the text differs." />
        </div>
      </Section>
      <div className="grid gap-8 sm:grid-cols-2">
        <Section title="On the way">
          <div className="grid gap-4">
            <ProgressBar
              label="Reading lines"
              done={412}
              total={1000}
              unit="lines"
              note="You may leave this page; it goes on."
            />
            <ProgressBar label="Looking through the price list" done={83} total={null} unit="rows" />
            <SkeletonRows rows={3} what="lines" />
            <CopyText text="2026-0041-K7Q2" label="the order number" />
          </div>
        </Section>
        <Section title="Facts and nothing">
          <Facts
            facts={[
              { name: 'Supply', value: '3–18 V', mono: true, basis: 'datasheet' },
              { name: 'Inputs', value: 'Schmitt' },
            ]}
          />
          <div className="mt-5">
            <EmptyState title="No batch yet" actions={<Button kind="primary">Start a batch</Button>}>
              A batch is so many units of one revision, made together.
            </EmptyState>
          </div>
        </Section>
        <Section title="Count">
          <LookPad />
        </Section>
      </div>
    </>
  );
}
