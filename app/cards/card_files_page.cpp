// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/cards/card_files_page.h"

#include "app/cards/trace_words.h"
#include "app/desk/number_text.h"
#include "app/desk/reading_in_hand.h"
#include "app/desk/theme.h"
#include "app/desk/workplace.h"
#include "core/card/usual_mean_indicated.h"
#include "storage/card_store.h"
#include "ui_card_files_page.h"

#include <QComboBox>
#include <QDragEnterEvent>
#include <QFileDialog>
#include <QKeyEvent>
#include <QMimeData>
#include <QSettings>
#include <QShortcut>

#include <algorithm>

namespace evenstroke {
namespace {

constexpr int wait_ms = 200;
constexpr std::size_t most_files = 200;

QString folder_setting()
{
    return QStringLiteral("cards/folder");
}

QStringList local_files(const QMimeData& data)
{
    QStringList paths;
    for (const QUrl& url : data.urls())
        if (url.isLocalFile())
            paths << url.toLocalFile();
    return paths;
}

} // namespace

CardFilesPage::CardFilesPage(Workplace& place, QWidget* parent)
    : Page(place, parent), ui_(std::make_unique<Ui::CardFilesPage>())
{
    ui_->setupUi(this);
    setAcceptDrops(true);
    ui_->traces->setColumnCount(4);
    ui_->traces->setHorizontalHeaderLabels(
        {tr("file"), tr("cylinder"), tr("samples"), tr("what the card says")});
    ui_->traces->verticalHeader()->hide();
    ui_->traces->verticalHeader()->setDefaultSectionSize(26);
    ui_->traces->horizontalHeader()->setHighlightSections(false);
    ui_->traces->horizontalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    ui_->traces->horizontalHeader()->setStretchLastSection(true);
    ui_->traces->setTabKeyNavigation(false);
    ui_->progress->hide();
    ui_->paper->hide();
    soon_.setSingleShot(true);
    soon_.setInterval(wait_ms);
    connect_parts();
    for (const Qt::Key enter : {Qt::Key_Return, Qt::Key_Enter}) {
        auto* take = new QShortcut(QKeySequence(Qt::CTRL | enter), this);
        take->setContext(Qt::WidgetWithChildrenShortcut);
        take->setAutoRepeat(false);
        connect(take, &QShortcut::activated, ui_->take_button, &QPushButton::click); // nothing while it is disabled
    }
    keep_room_for_bold(*this);
    say({});
}

CardFilesPage::~CardFilesPage()
{
    // A field that loses the focus while the window goes says what was typed to a page that is half gone.
    for (QWidget* child : findChildren<QWidget*>())
        child->blockSignals(true);
}

void CardFilesPage::connect_parts()
{
    connect(ui_->choose_button, &QPushButton::clicked, this, &CardFilesPage::choose_files);
    connect(ui_->forget_button, &QPushButton::clicked, this, &CardFilesPage::forget_files);
    connect(ui_->guess_button, &QPushButton::clicked, this, &CardFilesPage::look_anew);
    connect(ui_->unit_button, &QPushButton::clicked, this, [this] {
        if (proposed_.unit)
            ui_->boxes->choose_unit(*proposed_.unit);
    });
    connect(ui_->columns, &TraceColumns::changed, this, &CardFilesPage::take_boxes);
    // The table of columns is made anew: not while a box of it is still speaking.
    connect(ui_->boxes, &LayoutBoxes::changed, this, [this] {
        take_boxes();
        show_first_lines();
    });
    connect(&soon_, &QTimer::timeout, this, &CardFilesPage::preview);
    connect(&run_, &CardFilesRun::finished, this, &CardFilesPage::take_traces);
    connect(&run_, &CardFilesRun::progressed, this, [this] {
        ui_->progress->setVisible(run_.busy() && run_.total() > 1);
        ui_->progress->setRange(0, std::max(1, run_.total()));
        ui_->progress->setValue(run_.done());
    });
    connect(ui_->traces->selectionModel(), &QItemSelectionModel::currentRowChanged, this,
            &CardFilesPage::show_trace_in_hand);
    connect(ui_->take_button, &QPushButton::clicked, this, &CardFilesPage::ask_and_take);
    connect(ui_->paper_button, &QPushButton::toggled, this, [this](bool on) {
        ui_->paper->setVisible(on);
        ui_->preview->setMaximumHeight(on ? 150 : 220);
    });
    connect(ui_->doubtful_button, &QPushButton::clicked, this, [this] {
        all_the_same_ = true;
        show_into();
    });
    connect(ui_->paper, &PaperCard::changed, this, [this] { say({}); });
    connect(ui_->paper, &PaperCard::put_into_reading, this, &CardFilesPage::ask_and_put);
    connect(new QShortcut(QKeySequence::Open, this, nullptr, nullptr, Qt::WidgetWithChildrenShortcut),
            &QShortcut::activated, this, &CardFilesPage::choose_files);
    connect(new QShortcut(QKeySequence(Qt::CTRL | Qt::Key_L), this, nullptr, nullptr,
                          Qt::WidgetWithChildrenShortcut),
            &QShortcut::activated, this, &CardFilesPage::look_anew);
}

QWidget* CardFilesPage::first_focus()
{
    return ui_->choose_button;
}

const Engine* CardFilesPage::engine() const
{
    return judgement_ && judgement_->record ? &judgement_->record->engine : nullptr;
}

const Reading* CardFilesPage::reading_in_hand_here() const
{
    if (!engine())
        return nullptr;
    const auto index = reading_in_hand(*judgement_, workplace().selection());
    return index ? &judgement_->record->readings[*index] : nullptr;
}

QString CardFilesPage::foot_text() const
{
    return files_.empty() ? QString() : tr("%n file(s)", nullptr, static_cast<int>(files_.size()));
}

void CardFilesPage::refresh()
{
    judgement_ = workplace().judgement();
    if (shown_engine_ != workplace().selection().engine) {
        shown_engine_ = workplace().selection().engine;
        say({});
        if (!files_.empty())
            begin_layout();
    }
    follow_choice();
    if (engine())
        ui_->paper->set_engine(*engine());
    ui_->paper->set_usual([this](int cylinder) {
        const Reading* const reading = reading_in_hand_here();
        return reading ? indicator::usual_mean_indicated(*engine(), *reading, cylinder) : std::nullopt;
    });
    if (engine() && !files_.empty() && ui_->columns->columns_shown() == 0)
        begin_layout(); // files that were dropped before the engine was judged
    if (!files_.empty())
        preview_soon(); // another reading has other conditions
    show_all();
}

void CardFilesPage::choose_files()
{
    const QString folder = QSettings().value(folder_setting()).toString();
    const QStringList chosen =
        QFileDialog::getOpenFileNames(this, tr("Files of the indicating instrument"), folder,
                                      tr("Text in columns (*.csv *.txt *.dat *.asc *.tsv);;All files (*)"));
    if (chosen.isEmpty())
        return;
    QSettings().setValue(folder_setting(), QFileInfo(chosen.front()).absolutePath());
    add_files(chosen);
}

void CardFilesPage::add_files(const QStringList& paths)
{
    const bool first = files_.empty();
    for (const QString& path : paths) {
        const bool known = std::any_of(files_.begin(), files_.end(),
                                       [&](const CardFile& file) { return file.path == path; });
        if (!known && files_.size() < most_files)
            files_.push_back({path, std::nullopt});
    }
    say({});
    if (first && !files_.empty())
        begin_layout();
    preview_soon();
    show_all();
    emit foot_changed();
}

void CardFilesPage::forget_files()
{
    run_.stop();
    soon_.stop();
    files_.clear();
    traces_.clear();
    problem_.reset();
    first_lines_.clear();
    all_the_same_ = false;
    say({});
    show_all();
    emit foot_changed();
}

void CardFilesPage::set_layout_in_hand(const storage::TraceLayout& layout)
{
    layout_ = layout;
    problem_.reset();
    ui_->boxes->show_layout(layout_);
    show_first_lines();
    preview_soon();
}

void CardFilesPage::show_first_lines()
{
    if (engine())
        ui_->columns->show_file(first_lines_, layout_, *engine());
}

void CardFilesPage::take_boxes()
{
    remembered_ = false; // somebody says how this file is laid out
    ui_->columns->read_into(layout_);
    problem_ = ui_->boxes->read_into(layout_);
    ui_->boxes->show_layout(layout_);
    say({});
    preview_soon();
    show_all();
}

void CardFilesPage::preview()
{
    traces_.clear();
    if (!problem_)
        if (auto wrong = storage::find_layout_problem(layout_, ui_->columns->columns_shown()))
            problem_ = std::move(wrong);
    if (problem_ || !engine() || files_.empty()) {
        run_.stop();
        show_all();
        return;
    }
    CardFilesTask task{files_, layout_, *engine(), {}};
    if (const Reading* const reading = reading_in_hand_here())
        task.reading = *reading;
    run_.start(task);
    show_all();
}

void CardFilesPage::take_traces(const std::vector<FileTrace>& traces)
{
    traces_ = traces;
    find_stored();
    all_the_same_ = false;
    ui_->progress->hide();
    show_all();
}

/// Files of another day are the usual mistake: their cards are stored already, in another reading.
void CardFilesPage::find_stored()
{
    for (FileTrace& trace : traces_) {
        if (!trace.trace || !engine() || !workplace().history())
            continue;
        if (auto same = storage::CardStore(*workplace().history()).find_same(engine()->id, trace.packed))
            trace.same = std::move(same.value()); // what cannot be compared is refused when it is stored
    }
}

void CardFilesPage::set_cylinder(std::size_t index, std::optional<int> cylinder)
{
    say({});
    all_the_same_ = false;
    FileTrace& trace = traces_[index];
    trace.cylinder = cylinder;
    if (layout_.pressures.size() == 1)
        files_[trace.file].cylinder = cylinder;
    for (storage::PressureColumn& column : layout_.pressures)
        if (layout_.pressures.size() > 1 && column.column == trace.column)
            column.cylinder = cylinder;
    if (auto* const box = qobject_cast<QComboBox*>(ui_->traces->cellWidget(static_cast<int>(index), 1)))
        box->setCurrentIndex(cylinder.value_or(0));
    show_trace_in_hand();
    show_into();
}

void CardFilesPage::dragEnterEvent(QDragEnterEvent* event)
{
    if (event->mimeData() && !local_files(*event->mimeData()).isEmpty())
        event->acceptProposedAction();
}

void CardFilesPage::dropEvent(QDropEvent* event)
{
    add_files(local_files(*event->mimeData()));
    event->acceptProposedAction();
}

void CardFilesPage::keyPressEvent(QKeyEvent* event)
{
    if (event->key() != Qt::Key_Escape)
        return Page::keyPressEvent(event);
    if (run_.busy())
        run_.stop();
    else if (workplace().can_go_back())
        workplace().go_back();
    show_all();
}

} // namespace evenstroke
