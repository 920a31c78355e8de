//! Long work on a thread of its own, so that no frame waits for it.

use crate::measure::Progress;
use eframe::egui::Context;
use std::sync::mpsc::{Receiver, Sender, TryRecvError, channel};
use std::time::Duration;

/// How soon a frame follows on news: a few results that come close together share one.
const NEWS_AFTER: Duration = Duration::from_millis(15);

/// One job at a time; a newer one cancels the older. Dropping it cancels the job.
pub struct Worker<T> {
    running: Option<Running<T>>,
}

struct Running<T> {
    progress: Progress,
    news: Receiver<T>,
}

/// What a job tells of itself while it goes on.
pub struct Telling<T> {
    /// How far it has come, and whether it should stop.
    pub progress: Progress,
    /// There until the work is over.
    news: Option<Sender<T>>,
    ctx: Context,
}

impl<T> Telling<T> {
    /// Hands over a result, be it in part; nobody may be waiting for it any more.
    pub fn tell(&self, news: T) {
        let heard = self.news.as_ref().map(|sender| sender.send(news).is_ok());
        if heard == Some(true) {
            self.ctx.request_repaint_after(NEWS_AFTER);
        }
    }
}

impl<T> Drop for Telling<T> {
    /// The end of the work is news as well.
    fn drop(&mut self) {
        self.news = None;
        self.ctx.request_repaint_after(NEWS_AFTER);
    }
}

impl<T> Default for Worker<T> {
    fn default() -> Self {
        Self { running: None }
    }
}

impl<T> Drop for Worker<T> {
    fn drop(&mut self) {
        self.cancel();
    }
}

impl<T: Send + 'static> Worker<T> {
    /// Begins a job under a name, in place of the one that may be going on.
    ///
    /// # Errors
    /// The system has no thread to give.
    pub fn start(
        &mut self,
        ctx: &Context,
        name: &str,
        work: impl FnOnce(&Telling<T>) + Send + 'static,
    ) -> std::io::Result<()> {
        self.cancel();
        let (sender, news) = channel();
        let progress = Progress::new();
        let telling = Telling {
            progress: progress.clone(),
            news: Some(sender),
            ctx: ctx.clone(),
        };
        std::thread::Builder::new()
            .name(name.to_owned())
            .spawn(move || work(&telling))?;
        self.running = Some(Running { progress, news });
        Ok(())
    }
}

impl<T> Worker<T> {
    /// The newest result since the last call, and whether the work is done with it.
    pub fn news(&mut self) -> Option<T> {
        let running = self.running.as_ref()?;
        let mut newest = None;
        let is_over = loop {
            match running.news.try_recv() {
                Ok(news) => newest = Some(news),
                Err(TryRecvError::Empty) => break false,
                Err(TryRecvError::Disconnected) => break true,
            }
        };
        if is_over {
            self.running = None;
        }
        newest
    }

    /// The share of the work that is done, 0 to 1; `None` while there is none.
    pub fn share(&self) -> Option<f64> {
        self.running
            .as_ref()
            .map(|running| running.progress.share())
    }

    /// Asks the job to stop and forgets what it may still say.
    pub fn cancel(&mut self) {
        if let Some(running) = self.running.take() {
            running.progress.cancel();
        }
    }
}

#[cfg(test)]
mod tests {
    use super::Worker;
    use eframe::egui::Context;
    use std::sync::mpsc::channel;
    use std::time::Duration;

    /// Waits for a condition, at most some seconds.
    fn wait_for<T>(mut found: impl FnMut() -> Option<T>) -> T {
        for _ in 0..10_000 {
            if let Some(found) = found() {
                return found;
            }
            std::thread::sleep(Duration::from_millis(1));
        }
        panic!("it never came")
    }

    #[test]
    fn results_come_in_parts_and_the_newest_counts() {
        let mut worker = Worker::default();
        worker
            .start(&Context::default(), "counting", |telling| {
                telling.progress.set_total(3);
                for number in 1..=3 {
                    telling.progress.advance(1);
                    telling.tell(number);
                }
            })
            .expect("a thread");
        let last = wait_for(|| worker.news().filter(|number| *number == 3));
        assert_eq!(last, 3);
        wait_for(|| {
            worker.news();
            worker.share().is_none().then_some(())
        });
    }

    #[test]
    fn a_newer_job_cancels_the_older_whose_results_are_not_heard() {
        let (stopped, is_stopped) = channel();
        let mut worker = Worker::default();
        worker
            .start(&Context::default(), "older", move |telling| {
                while !telling.progress.is_cancelled() {
                    std::thread::sleep(Duration::from_millis(1));
                }
                telling.tell("older");
                let _ = stopped.send(());
            })
            .expect("a thread");
        worker
            .start(&Context::default(), "newer", |telling| {
                telling.tell("newer")
            })
            .expect("a thread");
        is_stopped
            .recv_timeout(Duration::from_secs(10))
            .expect("the older stops");
        assert_eq!(wait_for(|| worker.news()), "newer");
        assert_eq!(worker.news(), None);
    }
}
