// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QObject>
#include <QThreadPool>

#include <atomic>
#include <functional>
#include <memory>

namespace evenstroke {

/// One long piece of work at a time on a worker thread of low priority, with progress and a way to stop it. Only the
/// newest is answered, on the thread this object lives on; nothing is delivered once it is gone.
class WorkerRun : public QObject
{
    Q_OBJECT

public:
    explicit WorkerRun(QObject* parent = nullptr);
    ~WorkerRun() override;

    void stop();
    bool busy() const { return stopped_ != nullptr; }
    int done() const { return done_; }
    int total() const { return total_; }

signals:
    void progressed();

protected:
    /// Tells how far the work is; false: nobody wants to know any more.
    using Told = std::function<bool(int done, int of)>;
    /// What takes the result in, called where this object lives.
    using Delivery = std::function<void()>;
    /// @param work runs on the worker thread and must touch nothing of this object; its delivery may
    void begin(std::function<Delivery(const Told&)> work);

private:
    std::shared_ptr<std::atomic<bool>> stopped_; ///< of the run in hand; null: none
    int done_ = 0, total_ = 0;
    QThreadPool pool_;
};

} // namespace evenstroke
