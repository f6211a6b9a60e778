import Link from "next/link";

export interface Tab {
  href: string;
  label: string;
  count?: number;
}

/** Pages of one thing, as links: each has an address of its own. */
export function Tabs({ label, tabs, current }: { label: string; tabs: Tab[]; current: string }) {
  return (
    <nav className="tabs" aria-label={label}>
      {tabs.map((tab) => (
        <Link
          key={tab.href}
          href={tab.href}
          aria-current={tab.href.split("?")[0] === current.split("?")[0] ? "page" : undefined}
        >
          {tab.label}
          {tab.count !== undefined && ` ${tab.count}`}
        </Link>
      ))}
    </nav>
  );
}
