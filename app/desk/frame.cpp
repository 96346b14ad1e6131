// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/frame.h"

#include "app/desk/foot_line.h"
#include "app/desk/rail.h"
#include "app/desk/sentence_bar.h"
#include "app/desk/workplace.h"

#include <QCloseEvent>
#include <QGridLayout>
#include <QSettings>
#include <QStackedWidget>

namespace evenstroke {

Frame::Frame(Workplace& workplace, QWidget* parent)
    : QWidget(parent), workplace_(workplace), rail_(new Rail(this)), sentence_(new SentenceBar(workplace, this)),
      stack_(new QStackedWidget(this)), foot_(new FootLine(this))
{
    lay_out();
    add_keys();
    refresh_.setSingleShot(true);
    refresh_.setInterval(0);
    connect(&refresh_, &QTimer::timeout, this, &Frame::refresh_now);
    connect(rail_, &Rail::chosen, this, [this](const QString& name) { workplace_.open_page(name); });
    connect(&workplace_, &Workplace::page_changed, this, &Frame::follow_workplace);
    connect(&workplace_, &Workplace::selection_changed, this, &Frame::refresh_soon);
    connect(&workplace_, &Workplace::history_changed, this, &Frame::follow_workplace);
    connect(&workplace_, &Workplace::fleet_changed, this, [this] {
        if (workplace_.page() == QLatin1String("fleet"))
            refresh_soon();
    });
    connect(&workplace_, &Workplace::judgement_ready, this, [this](const QString& engine) {
        if (engine == workplace_.selection().engine)
            refresh_soon();
    });
    connect(&workplace_, &Workplace::activity_changed, this, &Frame::refresh_frame);
    connect(foot_, &FootLine::stop_asked, &workplace_, &Workplace::stop_work);
    connect(foot_, &FootLine::theme_asked, this, [this] {
        use_theme(theme().kind == ThemeKind::day ? ThemeKind::night : ThemeKind::day);
    });
}

void Frame::lay_out()
{
    auto* grid = new QGridLayout(this);
    grid->setContentsMargins(0, 0, 0, 0);
    grid->setSpacing(0);
    grid->addWidget(rail_, 0, 0, 2, 1);
    grid->addWidget(sentence_, 0, 1);
    grid->addWidget(stack_, 1, 1);
    grid->addWidget(foot_, 2, 0, 1, 2);
    grid->setRowStretch(1, 1);
    grid->setColumnStretch(1, 1);
    setMinimumSize(1024, 700); // nothing is cut down to here
    resize(1366, 768);
}

void Frame::add_page(PageEntry entry)
{
    if (entry.without_history)
        rail_->add_space();
    if (entry.on_rail)
        rail_->add(entry.name, entry.key, entry.title);
    entries_.push_back({std::move(entry)});
}

Frame::Entry* Frame::find(const QString& name)
{
    for (Entry& entry : entries_)
        if (entry.about.name == name)
            return &entry;
    return nullptr;
}

QStringList Frame::page_names() const
{
    QStringList names;
    for (const Entry& entry : entries_)
        names.append(entry.about.name);
    return names;
}

Page* Frame::made(Entry& entry)
{
    if (entry.page)
        return entry.page;
    entry.page = entry.about.make(workplace_);
    stack_->addWidget(entry.page);
    connect(entry.page, &Page::foot_changed, this, &Frame::refresh_frame);
    connect(entry.page, &Page::sentence_changed, this, &Frame::refresh_frame);
    return entry.page;
}

bool Frame::show_page(const QString& name)
{
    Entry* entry = find(name);
    if (!entry || (!workplace_.is_open() && !entry->about.without_history))
        return false;
    if (current_ && current_ != entry->page && !current_->may_leave())
        return false;
    Page* page = made(*entry);
    const bool turned = page != current_;
    current_ = page;
    refresh_now();
    stack_->setCurrentWidget(page);
    rail_->set_current(name);
    if (turned && page->first_focus())
        page->first_focus()->setFocus(Qt::OtherFocusReason);
    return true;
}

/// The workplace says which page is up; without a history only those that need none.
void Frame::follow_workplace()
{
    QString name = workplace_.page();
    const Entry* entry = find(name);
    if (!entry || (!workplace_.is_open() && !entry->about.without_history))
        for (const Entry& candidate : entries_)
            if (candidate.about.without_history != workplace_.is_open()) {
                name = candidate.about.name;
                break;
            }
    for (const Entry& each : entries_)
        rail_->set_enabled(each.about.name, workplace_.is_open() || each.about.without_history);
    if (name != workplace_.page()) {
        workplace_.open_page(name); // comes back here
        return;
    }
    if (!show_page(name) && current_) {
        for (const Entry& each : entries_)
            if (each.page == current_)
                workplace_.open_page(each.about.name); // it did not want to be left
    }
}

void Frame::begin(const QString& history_path, const QString& page)
{
    if (history_path.isEmpty() || workplace_.open(history_path))
        follow_workplace(); // the page that stays up then says what stood in the way
    else if (!page.isEmpty())
        workplace_.open_page(page);
}

void Frame::refresh_soon() { refresh_.start(); }

void Frame::refresh_now()
{
    refresh_.stop();
    if (current_)
        current_->refresh();
    for (const Entry& entry : entries_)
        if (entry.about.remark)
            rail_->set_remark(entry.about.name, workplace_.is_open() ? entry.about.remark(workplace_) : QString());
    refresh_frame();
}

void Frame::use_theme(ThemeKind kind)
{
    set_theme(kind);
    QSettings().setValue(QStringLiteral("theme"),
                         kind == ThemeKind::night ? QStringLiteral("night") : QStringLiteral("day"));
    if (current_)
        current_->refresh();
    refresh_frame();
}

QString Frame::sentence() const { return sentence_->text(); }

void Frame::recall()
{
    const QSettings settings;
    restoreGeometry(settings.value(QStringLiteral("window/geometry")).toByteArray());
    set_theme(settings.value(QStringLiteral("theme")).toString() == QLatin1String("night") ? ThemeKind::night
                                                                                          : ThemeKind::day);
}

void Frame::remember() const
{
    QSettings settings;
    settings.setValue(QStringLiteral("window/geometry"), saveGeometry());
    if (workplace_.is_open())
        settings.setValue(QStringLiteral("history/last"), workplace_.path());
}

void Frame::closeEvent(QCloseEvent* event)
{
    if (current_ && !current_->may_leave()) {
        event->ignore();
        return;
    }
    remember();
    event->accept();
}

} // namespace evenstroke
