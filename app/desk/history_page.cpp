// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/history_page.h"

#include "app/desk/number_text.h"
#include "app/desk/sample_files.h"
#include "app/desk/workplace.h"
#include "ui_history_page.h"

#include <QDir>
#include <QFileDialog>
#include <QFileInfo>
#include <QSettings>
#include <QStandardPaths>
#include <QTemporaryDir>

namespace evenstroke {

namespace {

constexpr int recent_kept = 5;
constexpr std::size_t refused_rows_shown = 200;

QString documents(const QString& file_name)
{
    return QDir(QStandardPaths::writableLocation(QStandardPaths::DocumentsLocation)).filePath(file_name);
}

QString file_filter() { return HistoryPage::tr("Histories (*.evenstroke);;All files (*)"); }

QString with_ending(QString path)
{
    if (!path.isEmpty() && QFileInfo(path).suffix().isEmpty())
        path += QLatin1String(".evenstroke");
    return path;
}

QString folder_line(const storage::FolderReport& folder)
{
    const QString name = folder.engine_name.empty()
                             ? to_qstring(folder.folder)
                             : HistoryPage::tr("%1, %2").arg(to_qstring(folder.vessel_name), to_qstring(folder.engine_name));
    if (!folder.taken)
        return HistoryPage::tr("%1: refused whole, nothing of it was taken in.").arg(name);
    QString line = HistoryPage::tr("%1: %2 new values, %3 known already, %4 new events")
                       .arg(name, whole_text(static_cast<double>(folder.values.fresh)),
                            whole_text(static_cast<double>(folder.values.same)),
                            whole_text(static_cast<double>(folder.events.fresh)));
    if (folder.cards.fresh > 0)
        line += HistoryPage::tr(", %1 cards").arg(whole_text(static_cast<double>(folder.cards.fresh)));
    return line + u'.';
}

QString report_text(const storage::TakeReport& report)
{
    QStringList lines;
    for (const storage::FolderReport& folder : report.folders) {
        lines.append(folder_line(folder));
        for (std::size_t i = 0; i < std::min(folder.refused.size(), refused_rows_shown); ++i)
            lines.append(QStringLiteral("    ") + to_qstring(folder.refused[i].text()));
        for (const std::string& remark : folder.remarks)
            lines.append(QStringLiteral("    ") + to_qstring(remark));
    }
    for (const std::string& file : report.ignored)
        lines.append(HistoryPage::tr("Left alone: %1").arg(to_qstring(file)));
    return lines.join(u'\n');
}

} // namespace

QStringList recent_histories()
{
    QStringList there;
    for (const QString& path : QSettings().value(QStringLiteral("history/recent")).toStringList())
        if (QFileInfo::exists(path))
            there.append(path);
    return there;
}

void note_recent_history(const QString& path)
{
    QStringList recent = recent_histories();
    recent.removeAll(path);
    recent.prepend(path);
    QSettings().setValue(QStringLiteral("history/recent"), QStringList(recent.mid(0, recent_kept)));
}

HistoryPage::HistoryPage(Workplace& place, QWidget* parent)
    : Page(place, parent), ui_(std::make_unique<Ui::HistoryPage>())
{
    ui_->setupUi(this);
    ui_->problem->hide();
    ui_->work->hide();
    ui_->report->hide();
    ui_->page->setStretchFactor(ui_->report, 1); // what was taken in and refused has the free half of the page
    ui_->report->setMinimumHeight(160);
    connect(ui_->open_button, &QPushButton::clicked, this, &HistoryPage::ask_open);
    connect(ui_->new_button, &QPushButton::clicked, this, &HistoryPage::ask_new);
    connect(ui_->folder_button, &QPushButton::clicked, this, &HistoryPage::ask_folder);
    connect(ui_->sample_button, &QPushButton::clicked, this, &HistoryPage::ask_sample);
    connect(ui_->stop_button, &QPushButton::clicked, this, [this] { taking_.stop(); });
    connect(&taking_, &TakingIn::progress, this, [this](qint64 done, qint64 total) {
        ui_->work_bar->setValue(total > 0 ? static_cast<int>(1000 * done / total) : 0);
    });
    connect(&taking_, &TakingIn::finished, this, &HistoryPage::show_report);
}

HistoryPage::~HistoryPage() = default;

QString HistoryPage::sentence() const
{
    return workplace().is_open() ? tr("The history of {vessel}.") : tr("No history is open.");
}

QWidget* HistoryPage::first_focus() { return ui_->open_button; }

void HistoryPage::refresh()
{
    const bool open = workplace().is_open();
    std::size_t engines = 0;
    for (const VesselChoice& vessel : workplace().vessels())
        engines += vessel.engines.size();
    ui_->heading->setText(open ? QFileInfo(workplace().path()).fileName()
                               : tr("A history keeps all readings of a ship, or of a fleet, in one file."));
    ui_->about->setText(open ? tr("%1 · %n engine(s)", nullptr, static_cast<int>(engines))
                                   .arg(QDir::toNativeSeparators(QFileInfo(workplace().path()).absoluteFilePath()))
                             : tr("Begin in one of four ways."));
    ui_->folder_words->setText(
        open ? tr("Its readings and events join the history that is open. The same again changes nothing.")
             : tr("Readings kept as tables: a folder with engine.json and readings.csv, or a whole fleet of them."));
    ui_->folder_button->setEnabled(!working() && !workplace().read_only());
    ui_->sample_button->setEnabled(!working());
    ui_->work->setVisible(working());
    if (!open && workplace().problem())
        say(workplace().problem());
    show_recent();
}

void HistoryPage::show_recent()
{
    qDeleteAll(ui_->recent->findChildren<QWidget*>(QString(), Qt::FindDirectChildrenOnly));
    QStringList recent = recent_histories();
    recent.removeAll(workplace().path());
    ui_->recent->setVisible(!recent.isEmpty());
    if (recent.isEmpty())
        return;
    auto* heading = new QLabel(tr("Opened before"), ui_->recent);
    heading->setProperty("muted", true);
    ui_->recent_lines->addWidget(heading);
    for (const QString& path : recent) {
        auto* button = new QPushButton(QDir::toNativeSeparators(path), ui_->recent);
        button->setProperty("worded", true);
        connect(button, &QPushButton::clicked, this, [this, path] { open_history(path); });
        ui_->recent_lines->addWidget(button, 0, Qt::AlignLeft);
    }
}

void HistoryPage::say(const std::optional<Problem>& problem)
{
    ui_->problem->setVisible(problem.has_value());
    ui_->problem->setText(problem ? to_qstring(problem->text()) : QString());
}

bool HistoryPage::open_history(const QString& path)
{
    const auto problem = workplace().open(path);
    say(problem);
    if (!problem) {
        ui_->report->hide();
        note_recent_history(workplace().path());
    }
    return !problem;
}

bool HistoryPage::make_history(const QString& path)
{
    const auto problem = workplace().create(path);
    say(problem);
    if (!problem)
        note_recent_history(workplace().path());
    return !problem;
}

bool HistoryPage::take_in(const QStringList& folders)
{
    if (!workplace().is_open() || working())
        return false;
    say(std::nullopt);
    ui_->report->hide();
    ui_->work_bar->setValue(0);
    ui_->work_words->setText(tr("Taking in %1").arg(QDir::toNativeSeparators(folders.join(QStringLiteral(", ")))));
    if (sample_files_)
        ui_->work_words->setText(tr("Making the sample vessel"));
    taking_.start(workplace().path(), folders);
    refresh();
    return true;
}

bool HistoryPage::make_sample(const QString& path)
{
    sample_files_ = std::make_unique<QTemporaryDir>();
    if (const auto problem = write_sample_files(sample_files_->path())) {
        say(problem);
        sample_files_.reset();
        return false;
    }
    if (make_history(path) && take_in(QStringList{sample_files_->path()}))
        return true;
    sample_files_.reset();
    return false;
}

void HistoryPage::show_report()
{
    const bool sample = sample_files_ != nullptr;
    sample_files_.reset();
    say(taking_.problem());
    if (taking_.report()) {
        const bool smooth = !taking_.report()->anything_refused() && !taking_.report()->cancelled;
        ui_->report->setPlainText(taking_.report()->cancelled ? tr("Stopped. The history is as it was before.")
                                                              : report_text(*taking_.report()));
        ui_->report->setVisible(!(sample && smooth));
        workplace().changed();
        if (sample && smooth)
            workplace().open_page(QStringLiteral("fleet"));
    }
    refresh();
    emit work_done();
}

void HistoryPage::ask_open()
{
    const QString path = QFileDialog::getOpenFileName(this, tr("Open a history"), documents({}), file_filter());
    if (!path.isEmpty())
        open_history(path);
}

void HistoryPage::ask_new()
{
    const QString path = with_ending(QFileDialog::getSaveFileName(
        this, tr("Begin an empty history"), documents(QStringLiteral("history.evenstroke")), file_filter()));
    if (!path.isEmpty() && make_history(path))
        workplace().open_page(QStringLiteral("engine"));
}

void HistoryPage::ask_folder()
{
    const QString folder = QFileDialog::getExistingDirectory(this, tr("Take in a folder"), documents({}));
    if (folder.isEmpty())
        return;
    if (!workplace().is_open()) {
        const QString path = with_ending(
            QFileDialog::getSaveFileName(this, tr("Keep the history as"),
                                         documents(QFileInfo(folder).fileName() + QLatin1String(".evenstroke")),
                                         file_filter()));
        if (path.isEmpty() || !make_history(path))
            return;
        workplace().open_page(name());
    }
    take_in(QStringList{folder});
}

void HistoryPage::ask_sample()
{
    const QString path = with_ending(
        QFileDialog::getSaveFileName(this, tr("Keep the sample vessel's history as"),
                                     documents(QStringLiteral("sample_vessel.evenstroke")), file_filter()));
    if (!path.isEmpty()) {
        workplace().open_page(name());
        make_sample(path);
    }
}

} // namespace evenstroke
