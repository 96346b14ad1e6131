// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/desk/chooser.h"

#include "app/desk/theme.h"

#include <QGuiApplication>
#include <QKeyEvent>
#include <QLineEdit>
#include <QListView>
#include <QScreen>
#include <QScrollBar>
#include <QSortFilterProxyModel>
#include <QStandardItemModel>
#include <QVBoxLayout>

#include <algorithm>

namespace evenstroke {

namespace {
constexpr int row_height = 24, rows_at_once = 16, filter_from = 12, mark_size = 12;
}

Chooser::Chooser(const std::vector<Choice>& choices, Take take, QWidget* parent)
    : QFrame(parent, Qt::Popup), take_(std::move(take)), model_(new QStandardItemModel(this)),
      narrowed_(new QSortFilterProxyModel(this)), filter_(new QLineEdit(this)), list_(new QListView(this))
{
    setAttribute(Qt::WA_DeleteOnClose);
    setFrameShape(QFrame::Box);
    setStyleSheet(QStringLiteral("evenstroke--Chooser { background: %1; border: 1px solid %2; }"
                                 "QListView { background: %1; } QListView::item { height: %3px; padding: 0px 8px; }"
                                 "QListView::item:selected { background: %4; color: %5; }")
                      .arg(theme().sheet.name(), theme().muted.name())
                      .arg(row_height)
                      .arg(theme().band.name(), theme().ink.name()));
    auto* layout = new QVBoxLayout(this);
    layout->setContentsMargins(1, 4, 1, 4);
    layout->setSpacing(4);
    layout->addWidget(filter_);
    layout->addWidget(list_);
    filter_->setPlaceholderText(tr("type to narrow the list"));
    filter_->setVisible(choices.size() >= filter_from);
    filter_->installEventFilter(this);
    list_->installEventFilter(this);
    narrowed_->setSourceModel(model_);
    narrowed_->setFilterCaseSensitivity(Qt::CaseInsensitive);
    list_->setModel(narrowed_);
    list_->setEditTriggers(QAbstractItemView::NoEditTriggers);
    list_->setUniformItemSizes(true);
    list_->setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    list_->setFrameShape(QFrame::NoFrame);
    list_->setMouseTracking(true);
    connect(filter_, &QLineEdit::textChanged, this, [this](const QString& text) {
        narrowed_->setFilterFixedString(text);
        list_->setCurrentIndex(narrowed_->index(0, 0));
    });
    connect(list_, &QListView::clicked, this, [this](const QModelIndex&) { take_current(); });
    connect(list_, &QListView::entered, list_, &QListView::setCurrentIndex);
    fill(choices);
}

void Chooser::fill(const std::vector<Choice>& choices)
{
    int chosen_row = 0, widest = 0;
    // Where one line has a mark the others keep its room, so that the texts stand under each other.
    const bool any_mark = std::any_of(choices.begin(), choices.end(), [](const Choice& choice) { return has_mark(choice.level); });
    QPixmap blank(mark_size, mark_size);
    blank.fill(Qt::transparent);
    for (const Choice& choice : choices) {
        const QString text = has_mark(choice.level) ? tr("%1 · %2").arg(choice.text, level_text(choice.level)) : choice.text;
        auto* item = new QStandardItem(text);
        item->setData(choice.value);
        if (any_mark)
            item->setIcon(has_mark(choice.level) ? mark_pixmap(choice.level, mark_size, devicePixelRatioF()) : blank);
        QFont font = type(TypeSize::body, choice.chosen);
        item->setFont(font);
        widest = std::max(widest, QFontMetrics(font).horizontalAdvance(text));
        if (choice.chosen)
            chosen_row = model_->rowCount();
        model_->appendRow(item);
    }
    list_->setCurrentIndex(narrowed_->index(chosen_row, 0));
    const int rows = std::clamp(model_->rowCount(), 1, rows_at_once);
    list_->setFixedHeight(rows * row_height + 2);
    setMinimumWidth(std::clamp(widest + 64, 160, 560));
}

void Chooser::open_below(QWidget* anchor)
{
    adjustSize();
    QPoint corner = anchor->mapToGlobal(QPoint(0, anchor->height() + 2));
    if (const QScreen* screen = anchor->screen()) {
        const QRect area = screen->availableGeometry();
        corner.setX(std::clamp(corner.x(), area.left(), std::max(area.left(), area.right() - width())));
    }
    move(corner);
    show();
    list_->scrollTo(list_->currentIndex(), QAbstractItemView::PositionAtCenter);
    (filter_->isVisible() ? static_cast<QWidget*>(filter_) : list_)->setFocus();
}

bool Chooser::eventFilter(QObject* watched, QEvent* event)
{
    if (event->type() != QEvent::KeyPress)
        return QFrame::eventFilter(watched, event);
    auto* key = static_cast<QKeyEvent*>(event);
    switch (key->key()) {
    case Qt::Key_Return:
    case Qt::Key_Enter: take_current(); return true;
    case Qt::Key_Escape: close(); return true;
    case Qt::Key_Up:
    case Qt::Key_Down:
    case Qt::Key_PageUp:
    case Qt::Key_PageDown:
        if (watched == filter_) {
            QCoreApplication::sendEvent(list_, event);
            return true;
        }
        break;
    default: break;
    }
    return QFrame::eventFilter(watched, event);
}

void Chooser::keyPressEvent(QKeyEvent* event)
{
    if (event->key() == Qt::Key_Escape)
        close();
    else
        QFrame::keyPressEvent(event);
}

void Chooser::take_current()
{
    const QModelIndex index = list_->currentIndex();
    const Take take = take_;
    const QVariant value = index.data(Qt::UserRole + 1);
    const bool valid = index.isValid();
    close();
    if (valid && take)
        take(value);
}

} // namespace evenstroke
