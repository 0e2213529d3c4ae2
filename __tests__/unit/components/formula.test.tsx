/** @jest-environment jsdom */
import { render, screen } from '@testing-library/react';
import { Formula } from '@/components/chemistry/formula';
import { formulaText } from '@/components/chemistry/formula-parts';

describe('a formula', () => {
  it.each([
    ['Cu(NH3)4+2', 'Cu(NH₃)₄²⁺'],
    ['CuSO4.5H2O', 'CuSO₄·5H₂O'],
    ['PbI2(s)', 'PbI₂(s)'],
    ['Ag(CN)2-', 'Ag(CN)₂⁻'],
    ['SO4-2', 'SO₄²⁻'],
    ['NH4+', 'NH₄⁺'],
    ['H+', 'H⁺'],
    ['Fe(CN)6-4', 'Fe(CN)₆⁴⁻'],
    ['CaSO4.0.5H2O', 'CaSO₄·0.5H₂O'],
    ['Na2CO3.10H2O', 'Na₂CO₃·10H₂O'],
    ['Fe(NH4)2(SO4)2.6H2O', 'Fe(NH₄)₂(SO₄)₂·6H₂O'],
    ['CO2(g)', 'CO₂(g)'],
    ['Ag+(aq)', 'Ag⁺(aq)'],
    ['H2O', 'H₂O'],
    ['Al2(SO4)3', 'Al₂(SO₄)₃'],
  ])('%s is set as %s', (id, set) => {
    expect(formulaText(id)).toBe(set);
  });

  it('puts counts below the line and the charge above it', () => {
    const { container } = render(<Formula id="Cu(NH3)4+2" />);
    expect([...container.querySelectorAll('sub')].map((part) => part.textContent)).toEqual(['3', '4']);
    expect([...container.querySelectorAll('sup')].map((part) => part.textContent)).toEqual(['2+']);
  });

  it('is read by its name, and only by its name', () => {
    render(<Formula id="PbI2(s)" name="lead(II) iodide, solid" />);
    const said = screen.getByText('lead(II) iodide, solid');
    expect(said.closest('[aria-hidden]')).toBeNull();
    expect(screen.getByText('PbI').closest('[aria-hidden="true"]')).not.toBeNull();
  });
});
