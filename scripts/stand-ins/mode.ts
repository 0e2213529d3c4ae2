/** How a stand-in behaves just now; set through its control address to try faults. */
export type Mode = 'ok' | 'slow' | 'down' | 'garbage' | 'refuse' | 'partial' | 'backorder' | 'price-change';
export const MODES: readonly Mode[] = [
  'ok',
  'slow',
  'down',
  'garbage',
  'refuse',
  'partial',
  'backorder',
  'price-change',
];
export type Service = 'mail' | 'payments' | 'supplier';

export class Modes {
  private readonly modes: Record<Service, Mode> = { mail: 'ok', payments: 'ok', supplier: 'ok' };

  get(service: Service): Mode {
    return this.modes[service];
  }
  set(service: Service, mode: Mode): void {
    this.modes[service] = mode;
  }
  all(): Readonly<Record<Service, Mode>> {
    return { ...this.modes };
  }
}

export const SLOW_MS = 3000;
export function wait(milliseconds: number): Promise<void> {
  return new Promise((resolve) => {
    setTimeout(resolve, milliseconds);
  });
}
