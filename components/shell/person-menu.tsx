'use client';

import { DropdownMenu } from 'radix-ui';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { ROLE_NAMES } from '@/lib/domain/roles';
import type { Role } from '@/lib/domain/roles';
import { callApi } from '@/lib/client/api';
import { accountEndpoints } from '@/lib/schemas/account';

const ITEM =
  'block w-full min-h-11 px-4 py-2.5 text-left text-ink no-underline outline-none data-[highlighted]:bg-copper-wash';

/** Who is signed in, and how to leave. */
export function PersonMenu({ name, roles }: { readonly name: string; readonly roles: readonly Role[] }) {
  const router = useRouter();
  const leave = async (everywhere: boolean) => {
    await (everywhere
      ? callApi(accountEndpoints.signOutEverywhere, {})
      : callApi(accountEndpoints.signOut, {}));
    router.push('/sign-in');
    router.refresh();
  };
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger className="min-h-11 max-w-52 rounded px-2 text-left leading-tight hover:bg-sunken">
        <span className="block truncate text-[0.95rem] font-semibold">{name}</span>
        <span className="block truncate text-xs text-soft">
          {roles.map((role) => ROLE_NAMES[role]).join(', ')}
        </span>
        <span className="sr-only">, your account</span>
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={6}
          className="z-50 min-w-56 rounded border border-line bg-raised py-1 shadow-md"
        >
          <DropdownMenu.Item asChild>
            <Link href="/account" className={ITEM}>
              Your account
            </Link>
          </DropdownMenu.Item>
          <DropdownMenu.Item className={ITEM} onSelect={() => void leave(false)}>
            Sign out
          </DropdownMenu.Item>
          <DropdownMenu.Item className={ITEM} onSelect={() => void leave(true)}>
            Sign out everywhere
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
