/** Parts as drawn, and a cabinet. */
import { CabinetDrawing, type DrawnBin } from '@/components/drawings/cabinet-drawing';
import { CapacitorDrawing } from '@/components/drawings/capacitor-drawing';
import { ChipDrawing } from '@/components/drawings/chip-drawing';
import { DiodeDrawing, LedDrawing } from '@/components/drawings/diode-drawing';
import { IcDrawing } from '@/components/drawings/ic-drawing';
import { PotDrawing } from '@/components/drawings/pot-drawing';
import { ResistorDrawing } from '@/components/drawings/resistor-drawing';
import { To92Drawing } from '@/components/drawings/to92-drawing';
import { Section } from '@/components/ui/section';

const CONTENTS =
  '100R 220R 470R 1k 2k2 4k7 10k 22k 47k 100k 220k 470k 1M 120k 18k 33k 15k 1k5 10n 22n 47n 100n 1n 2n2 4n7 10u'.split(
    ' ',
  );

const BINS: readonly DrawnBin[] = CONTENTS.map((content, index) => {
  const column = (index % 13) + 1;
  const row = Math.floor(index / 13) + 1;
  const stops: Record<string, number> = { '4k7': 1, '120k': 2, '18k': 3, '100n': 4 };
  return {
    code: `A-${String(column).padStart(2, '0')}-${row}`,
    content,
    fill: ((index * 37) % 100) / 100,
    href: `/look?bin=${index}`,
    stop: stops[content] ?? null,
    stopDone: content === '4k7',
    countDue: content === '100k' || content === '4n7',
    column,
    row,
  };
});

export function LookDrawings() {
  return (
    <>
      <Section title="Cabinet A" remainder="back room, left">
        <CabinetDrawing label="Cabinet A, 26 bins" columns={13} bins={BINS} />
      </Section>
      <Section title="Drawn parts">
        <div className="flex flex-wrap items-center gap-x-8 gap-y-5">
          <ResistorDrawing
            bands={['brown', 'black', 'black', 'orange', 'brown']}
            body="blue"
            name="brown, black, black, orange, brown"
          />
          <ResistorDrawing bands={['brown', 'black', 'green', 'gold']} body="tan" name="brown, black, green, gold" />
          <ResistorDrawing
            bands={['grey', 'white', 'silver', 'pink', 'white']}
            body="blue"
            name="odd colours"
            scale={2}
          />
          <CapacitorDrawing shape="disc" mark="104" name="disc marked 104" />
          <CapacitorDrawing shape="box" mark="2n2" second="63" name="film box marked 2n2" />
          <CapacitorDrawing shape="can" mark="10µF" second="25V" name="can" />
          <CapacitorDrawing shape="can-bipolar" mark="10µF" second="25V" name="bipolar can" />
          <CapacitorDrawing shape="drop" mark="106" second="25" name="tantalum drop" />
          <ChipDrawing kind="resistor" mark="4701" name="chip marked 4701" />
          <ChipDrawing kind="capacitor" mark={null} name="chip without a mark" />
          <IcDrawing pins={8} mark="TL072CP" name="IC" />
          <IcDrawing pins={14} mark="CD4093BE" name="IC" />
          <IcDrawing pins={24} mark="CD4067BE" name="IC" />
          <To92Drawing leads="EBC" mark="2N3904" name="TO-92, E B C" />
          <To92Drawing leads={null} mark="J112" name="TO-92, leads unknown" />
          <DiodeDrawing body="glass" name="glass diode" />
          <DiodeDrawing body="glass" band="blue" name="glass diode, blue band" />
          <DiodeDrawing body="black" name="black diode" />
          <LedDrawing colour="red" name="red LED" />
          <PotDrawing form="potentiometer" mark="B50k" name="potentiometer" />
          <PotDrawing form="trimmer" mark="103" name="trimmer" />
          <CapacitorDrawing shape="disc" mark="104" name="disc marked 104, large" scale={2} />
        </div>
      </Section>
    </>
  );
}
