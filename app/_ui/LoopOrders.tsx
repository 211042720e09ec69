import styles from "./LoopOrders.module.css";
import { capital, loopName } from "./words";

/** Links from one loop order to another; those with nothing stored are left out, save the chosen one. */
export function LoopOrders({ present, chosen }: { present: readonly number[]; chosen: number }) {
  const orders = [...new Set([...present, chosen])].sort((a, b) => a - b);
  return (
    <nav aria-label="Loop order">
      <ul className={styles.orders}>
        {orders.map((loops) => (
          <li key={loops}>
            <a
              href={loops === 0 ? "/#amplitudes" : `/?loops=${loops}#amplitudes`}
              aria-current={loops === chosen ? "page" : undefined}
            >
              {capital(loops === 0 ? "trees" : loopName(loops))}
            </a>
          </li>
        ))}
      </ul>
    </nav>
  );
}
