/** @jest-environment jsdom */
import { fireEvent, render, screen, waitFor } from '@testing-library/react';
import axe from 'axe-core';
import { useState } from 'react';
import { Formula } from '@/components/chemistry/formula';
import { GhsPictogram, PICTOGRAM_NAMES } from '@/components/chemistry/ghs-pictogram';
import { Ladder } from '@/components/chemistry/ladder';
import { SignalWord } from '@/components/chemistry/signal-word';
import { Vessel } from '@/components/chemistry/vessel';
import { StepStrip } from '@/components/steps/step-strip';
import { Alert } from '@/components/ui/alert';
import { Amount } from '@/components/ui/amount';
import { Combobox } from '@/components/ui/combobox';
import type { Choice } from '@/components/ui/combobox';
import { Checkbox, NumberInput, Select, TextArea, TextInput } from '@/components/ui/inputs';
import { Progress } from '@/components/ui/progress';
import { RadioGroup } from '@/components/ui/radio-group';
import { StateMark } from '@/components/ui/state-mark';

/** Violations in what is rendered; colours are measured in the browser suite, since jsdom has no layout. */
async function violations(element: Element): Promise<string[]> {
  const { violations: found } = await axe.run(element, {
    rules: { 'color-contrast': { enabled: false }, region: { enabled: false } },
  });
  return found.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`);
}

const SALTS: readonly Choice[] = [
  { value: 'a', label: 'silver nitrate', detail: 'AgNO3' },
  { value: 'b', label: 'sodium chloride', detail: 'NaCl' },
  { value: 'c', label: 'sodium cyanide', detail: 'NaCN' },
];

function SaltField({ onChoose }: { readonly onChoose?: (choice: Choice) => void }) {
  const [chosen, setChosen] = useState<Choice | null>(null);
  return (
    <Combobox
      id="salt"
      label="Salt"
      hint="By name"
      chosen={chosen}
      onChoose={(choice) => {
        setChosen(choice);
        onChoose?.(choice);
      }}
      find={(text) => Promise.resolve(SALTS.filter(({ label }) => label.includes(text)))}
    />
  );
}

describe('the search field of a form', () => {
  it('is chosen from with the keys alone', async () => {
    const chosen: string[] = [];
    render(<SaltField onChoose={({ value }) => chosen.push(value)} />);
    const field = screen.getByRole('combobox', { name: 'Salt' });
    fireEvent.focus(field);
    fireEvent.change(field, { target: { value: 'sodium' } });
    await waitFor(() => expect(screen.getAllByRole('option')).toHaveLength(2));
    expect(field.getAttribute('aria-expanded')).toBe('true');
    fireEvent.keyDown(field, { key: 'ArrowDown' });
    const active = document.getElementById(field.getAttribute('aria-activedescendant') ?? '');
    expect(active?.textContent).toContain('sodium cyanide');
    fireEvent.keyDown(field, { key: 'Enter' });
    expect(chosen).toEqual(['c']);
    expect((field as HTMLInputElement).value).toBe('sodium cyanide');
    expect(field.getAttribute('aria-expanded')).toBe('false');
  });

  it('keeps what was chosen when Escape leaves it', async () => {
    const chosen: string[] = [];
    render(<SaltField onChoose={({ value }) => chosen.push(value)} />);
    const field = screen.getByRole('combobox', { name: 'Salt' });
    fireEvent.change(field, { target: { value: 'silver' } });
    await waitFor(() => expect(screen.getAllByRole('option')).toHaveLength(1));
    fireEvent.keyDown(field, { key: 'Escape' });
    expect(chosen).toEqual([]);
    expect((field as HTMLInputElement).value).toBe('');
    expect(field.getAttribute('aria-expanded')).toBe('false');
  });

  it('says that nothing was found, and takes no choice then', async () => {
    const chosen: string[] = [];
    render(<SaltField onChoose={({ value }) => chosen.push(value)} />);
    const field = screen.getByRole('combobox', { name: 'Salt' });
    fireEvent.change(field, { target: { value: 'zz' } });
    await screen.findByText('Nothing is called that.');
    fireEvent.keyDown(field, { key: 'Enter' });
    expect(chosen).toEqual([]);
  });

  it('has no accessibility violation, closed or open', async () => {
    const { container } = render(<SaltField />);
    expect(await violations(container)).toEqual([]);
    fireEvent.change(screen.getByRole('combobox', { name: 'Salt' }), { target: { value: 's' } });
    await waitFor(() => expect(screen.getAllByRole('option')).toHaveLength(3));
    expect(await violations(container)).toEqual([]);
  });
});

describe('fields', () => {
  it('are tied to their label, unit, hint and error', async () => {
    const { container } = render(
      <form>
        <NumberInput id="volume" label="Volume" unit="mL" hint="Per bench" error="Must be above 0" />
        <TextInput id="name" label="Name" />
        <Select id="room" label="Room">
          <option>B12</option>
        </Select>
        <TextArea id="why" label="Reason" />
        <Checkbox id="spare" label="With spare" hint="One in ten" />
        <RadioGroup
          name="outcome"
          legend="Outcome"
          hint="One of them"
          value="agree"
          onChange={() => undefined}
          choices={[
            { value: 'agree', label: 'Agree' },
            { value: 'refuse', label: 'Refuse', hint: 'With a reason' },
          ]}
        />
      </form>,
    );
    const volume = screen.getByRole('textbox', { name: 'Volume' });
    const described = (volume.getAttribute('aria-describedby') ?? '')
      .split(' ')
      .map((id) => document.getElementById(id)?.textContent ?? '');
    expect(described.join(' ')).toContain('mL');
    expect(described.join(' ')).toContain('Per bench');
    expect(described.join(' ')).toContain('Must be above 0');
    expect(volume.getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByRole('group', { name: 'Outcome' })).toBeTruthy();
    expect((screen.getByRole('radio', { name: /^Agree/ }) as HTMLInputElement).checked).toBe(true);
    expect(await violations(container)).toEqual([]);
  });
});

describe('amounts', () => {
  it.each([
    [4.5e-11, 'mol/L', 2, '4.5 × 10⁻¹¹ mol/L'],
    [1.2000000000000002, 'g', 3, '1.20 g'],
    [0.0005, 'g', 3, '0.500 mg'],
    [0.00005, 'g', 3, '50.0 µg'],
    [0.05, 'g', 3, '50.0 mg'],
    [1500, 'mL', 3, '1.50 L'],
    [0, 'mol/L', 3, '0 mol/L'],
    [0.12486, 'mol/L', 3, '0.125 mol/L'],
    [9.999, 'mL', 3, '10.0 mL'],
    [2e23, '1/mol', 2, '2.0 × 10²³ 1/mol'],
  ])('%d %s to %i figures reads %s', (value, unit, significant, reads) => {
    const { container } = render(<Amount value={value} unit={unit} significant={significant} />);
    expect(container.textContent?.replaceAll('\u202f', ' ')).toBe(reads);
    expect(container.textContent).not.toMatch(/\de[-+]?\d/);
  });
});

describe('pictures', () => {
  it('tell in words what they show', async () => {
    const { container } = render(
      <main>
        <Vessel
          capacityMl={250}
          volumeMl={100}
          hex="#2b5fb4"
          words="deep blue"
          solids={[{ id: 'x', name: 'copper(II) hydroxide', hex: '#8fb8d0', grams: 0.5 }]}
          gases={['ammonia']}
        />
        <Ladder
          species={[
            { id: 'Cu(NH3)4+2', molarity: 0.125 },
            { id: 'Ag+', molarity: 3e-22 },
            { id: 'H+', molarity: 1e-40 },
          ]}
          marks={[{ label: 'detection', molarity: 1e-6 }]}
        />
        {Object.keys(PICTOGRAM_NAMES).map((code) => (
          <GhsPictogram key={code} code={code} />
        ))}
        <SignalWord word="Danger" />
        <Formula id="CuSO4.5H2O" name="copper(II) sulfate pentahydrate" />
      </main>,
    );
    const vessel = screen.getByRole('img', { name: /beaker/ });
    for (const told of ['deep blue', 'copper(II) hydroxide', 'ammonia'])
      expect(vessel.getAttribute('aria-label')).toContain(told);
    for (const name of Object.values(PICTOGRAM_NAMES)) expect(screen.getByRole('img', { name })).toBeTruthy();
    expect(container.querySelectorAll('tbody tr')).toHaveLength(3);
    expect(screen.getByText('Danger')).toBeTruthy();
    expect(await violations(container)).toEqual([]);
  });

  it('draw nothing outside the frame, however full or empty', () => {
    for (const volumeMl of [0, 1e-6, 250, 9000]) {
      const { container, unmount } = render(
        <Vessel
          capacityMl={250}
          volumeMl={volumeMl}
          hex="#fff"
          words="colourless"
          solids={[{ id: 'x', name: 'x', hex: '#eee', grams: 900 }]}
        />,
      );
      for (const rect of container.querySelectorAll('rect')) {
        expect(Number(rect.getAttribute('y'))).toBeGreaterThanOrEqual(0);
        expect(Number(rect.getAttribute('height'))).toBeGreaterThanOrEqual(0);
        expect(Number(rect.getAttribute('y')) + Number(rect.getAttribute('height'))).toBeLessThanOrEqual(250);
      }
      unmount();
    }
  });
});

describe('states', () => {
  it('are told by word and shape as well as colour', async () => {
    const { container } = render(
      <main>
        <StepStrip done={1} now="waits for safety" />
        <StateMark state="in-review" />
        <Alert tone="attention" title="Low on silver nitrate" />
        <Progress label="Reading lines" done={3} total={10} />
      </main>,
    );
    expect(screen.getByText('waits for safety').closest('li')?.getAttribute('aria-current')).toBe('step');
    expect(screen.getByText('Ask').closest('li')?.textContent).toContain('done');
    expect(screen.getByText('In review', { exact: false })).toBeTruthy();
    expect(screen.getByRole('progressbar', { name: 'Reading lines' })).toBeTruthy();
    expect(await violations(container)).toEqual([]);
  });
});
