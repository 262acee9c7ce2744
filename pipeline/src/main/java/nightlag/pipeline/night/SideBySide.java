package nightlag.pipeline.night;

import java.util.ArrayDeque;
import java.util.Iterator;
import java.util.NoSuchElementException;
import java.util.Queue;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.function.Function;

/**
 * Works on items side by side and gives the results back in the items' order. It runs only a few items ahead of the
 * reader, so that memory stays bounded; the items themselves are drawn on the reader's thread.
 *
 * @param <T> an item
 * @param <R> its result
 */
final class SideBySide<T, R> implements Iterator<R>, AutoCloseable {
    private static final int AHEAD_PER_WORKER = 4;

    private final Iterator<T> items;
    private final Function<T, R> work;
    private final ExecutorService pool;
    private final Queue<Future<R>> running = new ArrayDeque<>();
    private final int ahead;

    SideBySide(Iterator<T> items, Function<T, R> work, int workers) {
        this.items = items;
        this.work = work;
        this.ahead = workers * AHEAD_PER_WORKER;
        AtomicInteger count = new AtomicInteger();
        this.pool = Executors.newFixedThreadPool(workers, task -> {
            Thread thread = new Thread(task, "worker-" + count.incrementAndGet());
            thread.setDaemon(true);
            return thread;
        });
    }

    @Override
    public boolean hasNext() {
        return !running.isEmpty() || items.hasNext();
    }

    @Override
    public R next() {
        while (running.size() < ahead && items.hasNext()) {
            T item = items.next();
            running.add(pool.submit(() -> work.apply(item)));
        }
        Future<R> first = running.poll();
        if (first == null) {
            throw new NoSuchElementException();
        }
        try {
            return first.get();
        } catch (ExecutionException e) {
            if (e.getCause() instanceof Error error) {
                throw error;
            }
            throw new IllegalStateException(e.getCause());
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new IllegalStateException("interrupted", e);
        }
    }

    @Override
    public void close() {
        pool.shutdownNow();
    }
}
